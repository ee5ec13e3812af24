// One implicit step of the Newmark family by Newton iteration with the consistent tangent, over the lane scalar; every
// lane has its own time step and its own end of the iteration:
//
//   M a1 + (1 + alpha) g(u1, v1) - alpha g(u0, v0) = (1 + alpha) p1 - alpha p0,   g = C v + K u + sum B^T f
//   u1 = u0 + dt v0 + dt^2 ((1/2 - beta) a0 + beta a1),   v1 = v0 + dt ((1 - gamma) a0 + gamma a1)
//
// alpha = 0 is Newmark (1959), alpha < 0 Hilber, Hughes & Taylor (1977). The unknown is a1, so beta = 0 works as well.
// The iteration starts from a1 = a0, which predicts u1 and v1 from all three of u0, v0, a0.
#pragma once

#include <algorithm>
#include <limits>
#include <vector>

#include "core/system/effective_solve.hpp"

namespace pilotis {

struct ImplicitCoefficients {
  double beta = 0.25, gamma = 0.5, alpha = 0;
};

template <class R>
struct ImplicitWorkspace {
  explicit ImplicitWorkspace(const System& system)
      : solve(system),
        u(system.freedoms),
        v(u),
        a(u),
        u_fixed(u),
        v_fixed(u),
        residual(u),
        forces(system),
        forces_before(system),
        trial(state_at_rest<R>(system).memory),
        unused(trial) {
    const Band stiffness = initial_stiffness(system);
    for (int i = 0; i < system.freedoms; ++i) stiffest = std::max(stiffest, std::abs(stiffness.at(i, i)));
  }

  EffectiveSolve<R> solve;
  std::vector<R> u, v, a;
  std::vector<R> u_fixed, v_fixed;  // the part of u1 and v1 that a1 does not change
  std::vector<R> residual;
  Forces<R> forces;         // at u, v: after a step, those of the accepted state
  Forces<R> forces_before;  // at the start of the step
  Memories<R> trial, unused;
  double stiffest = 0;  // N/m, for the rounding floor of the residual
};

// Newton gives up after this many corrections; a step that needs more is better halved.
inline constexpr int newton_limit = 25;

// What a step adds to u and v whatever a1 is.
template <class R>
void predict(const ImplicitCoefficients& c, const R& dt, const State<R>& state, ImplicitWorkspace<R>& w) noexcept {
  const R u_weight = dt * dt * (0.5 - c.beta), v_weight = dt * (1 - c.gamma);
  for (std::size_t i = 0; i < w.a.size(); ++i) {
    w.u_fixed[i] = state.u[i] + dt * state.v[i] + u_weight * state.a[i];
    w.v_fixed[i] = state.v[i] + v_weight * state.a[i];
  }
}

// u and v of the workspace from its a.
template <class R>
void newmark_update(const ImplicitCoefficients& c, const R& dt, ImplicitWorkspace<R>& w) noexcept {
  const R u_weight = dt * dt * c.beta, v_weight = dt * c.gamma;
  for (std::size_t i = 0; i < w.a.size(); ++i) {
    w.u[i] = w.u_fixed[i] + u_weight * w.a[i];
    w.v[i] = w.v_fixed[i] + v_weight * w.a[i];
  }
}

// Out-of-balance force of the trial a. Hht: alpha is not 0.
template <bool Hht, class R>
void out_of_balance(const System& system, const ImplicitCoefficients& c, const R* before, const R* after,
                    ImplicitWorkspace<R>& w) noexcept {
  const double weight = 1 + c.alpha;
  const R *internal = w.forces.internal.data(), *internal_before = w.forces_before.internal.data();
  for (int i = 0; i < system.freedoms; ++i)
    if constexpr (Hht)
      w.residual[i] =
          weight * (after[i] - internal[i]) - system.mass[i] * w.a[i] - c.alpha * (before[i] - internal_before[i]);
    else
      w.residual[i] = after[i] - internal[i] - system.mass[i] * w.a[i];
}

// Its largest magnitude, less what rounding alone can leave.
template <class R>
R imbalance(const System& system, const ImplicitWorkspace<R>& w) noexcept {
  R largest = splat<R>(0), farthest = splat<R>(0), poison = splat<R>(0);
  for (int i = 0; i < system.freedoms; ++i) {
    const R r = w.residual[i];
    largest = lane_max<R>(largest, lane_abs(r));
    poison += r - r;  // 0, or NaN from the first residual that is not finite: it must never pass for converged
    farthest = lane_max<R>(farthest, lane_abs(w.u[i]));
  }
  return largest + poison - 16 * std::numeric_limits<double>::epsilon() * w.stiffest * farthest;
}

// Where `moves`, the workspace's u, v, a and memories become the state's.
template <class R>
void accept(const Mask<R>& moves, State<R>& state, ImplicitWorkspace<R>& w) noexcept {
  if (all(moves)) {
    std::swap(state.u, w.u);
    std::swap(state.v, w.v);
    std::swap(state.a, w.a);
    std::swap(state.memory, w.trial);
    return;
  }
  for (std::size_t i = 0; i < w.a.size(); ++i) {
    state.u[i] = select(moves, w.u[i], state.u[i]);
    state.v[i] = select(moves, w.v[i], state.v[i]);
    state.a[i] = select(moves, w.a[i], state.a[i]);
  }
  select_memories<R>(moves, w.trial, state.memory);
}

// Loads [freedom] at both ends; `tolerance` in N. Gives the lanes that have converged: those of `state` move on, the
// others are left as they were. What one lane does never depends on its neighbors: a lane that has converged is not
// corrected any more, however long the others take.
template <class R>
Mask<R> implicit_step(const System& system, const ImplicitCoefficients& c, const R& dt, const R& tolerance,
                      const R* before, const R* after, State<R>& state, ImplicitWorkspace<R>& w) noexcept {
  const double weight = 1 + c.alpha;
  if (c.alpha != 0) internal_forces(system, state.u.data(), state.v.data(), state.memory, w.unused, w.forces_before);
  std::copy(state.a.begin(), state.a.end(), w.a.begin());
  predict(c, dt, state, w);
  Mask<R> converged{};
  for (int iteration = 0;; ++iteration) {
    newmark_update(c, dt, w);
    internal_forces(system, w.u.data(), w.v.data(), state.memory, w.trial, w.forces);
    c.alpha != 0 ? out_of_balance<true>(system, c, before, after, w)
                 : out_of_balance<false>(system, c, before, after, w);
    converged = imbalance(system, w) <= tolerance;
    if (all(converged) || iteration == newton_limit) break;
    w.solve.factor(system, R(weight * c.gamma * dt), R(weight * c.beta * dt * dt), w.forces.tangent.data());
    w.solve.solve(system, w.residual.data());
    for (int i = 0; i < system.freedoms; ++i) w.a[i] = select(converged, w.a[i], R(w.a[i] + w.residual[i]));
  }
  accept(converged, state, w);
  return converged;
}

}  // namespace pilotis
