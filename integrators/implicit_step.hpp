// One implicit step of the Newmark family by Newton iteration with the consistent tangent, over the lane scalar:
//
//   M a1 + (1 + alpha) g(u1, v1) - alpha g(u0, v0) = (1 + alpha) p1 - alpha p0,   g = C v + K u + sum B^T f
//   u1 = u0 + dt v0 + dt^2 ((1/2 - beta) a0 + beta a1),   v1 = v0 + dt ((1 - gamma) a0 + gamma a1)
//
// alpha = 0 is Newmark (1959), alpha < 0 Hilber, Hughes & Taylor (1977). The unknown is a1, so beta = 0 works as well.
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
        internal(u),
        internal_before(u),
        residual(u),
        tangent(system.elements),
        trial(state_at_rest<R>(system).memory),
        unused(trial) {
    const Band stiffness = initial_stiffness(system);
    for (int i = 0; i < system.freedoms; ++i) stiffest = std::max(stiffest, std::abs(stiffness.at(i, i)));
  }

  EffectiveSolve<R> solve;
  std::vector<R> u, v, a, internal, internal_before, residual, tangent;
  Memories<R> trial, unused;
  double stiffest = 0;  // N/m, for the rounding floor of the residual
};

// Newton gives up after this many corrections; a step that needs more is better halved.
inline constexpr int newton_limit = 25;

// u and v of the workspace from its a: the Newmark update of the state.
template <class R>
void newmark_update(const ImplicitCoefficients& c, double dt, const State<R>& state, ImplicitWorkspace<R>& w) noexcept {
  for (std::size_t i = 0; i < w.a.size(); ++i) {
    w.u[i] = state.u[i] + dt * state.v[i] + dt * dt * ((0.5 - c.beta) * state.a[i] + c.beta * w.a[i]);
    w.v[i] = state.v[i] + dt * ((1 - c.gamma) * state.a[i] + c.gamma * w.a[i]);
  }
}

// Out-of-balance force of the trial a; gives its largest magnitude less what rounding alone can leave.
template <class R>
R out_of_balance(const System& system, const ImplicitCoefficients& c, const R* before, const R* after,
                 ImplicitWorkspace<R>& w) noexcept {
  const double weight = 1 + c.alpha;
  R largest = splat<R>(0), farthest = splat<R>(0), poison = splat<R>(0);
  for (int i = 0; i < system.freedoms; ++i) {
    R r = weight * (after[i] - w.internal[i]) - system.mass[i] * w.a[i];
    if (c.alpha != 0) r -= c.alpha * (before[i] - w.internal_before[i]);
    w.residual[i] = r;
    largest = lane_max<R>(largest, lane_abs<R>(r));
    poison += r - r;  // 0, or NaN from the first residual that is not finite: it must never pass for converged
    farthest = lane_max<R>(farthest, lane_abs<R>(w.u[i]));
  }
  return largest + poison - 16 * std::numeric_limits<double>::epsilon() * w.stiffest * farthest;
}

// Loads [freedom] at both ends. `tolerance` in N. Gives the lanes that have converged; `state` moves on when all have
// and is left as it was otherwise.
template <class R>
Mask<R> implicit_step(const System& system, const ImplicitCoefficients& c, double dt, double tolerance, const R* before,
                      const R* after, State<R>& state, ImplicitWorkspace<R>& w) noexcept {
  const double weight = 1 + c.alpha;
  if (c.alpha != 0)
    internal_forces(system, state.u.data(), state.v.data(), state.memory, w.unused, w.internal_before.data(),
                    w.tangent.data());
  w.a = state.a;
  Mask<R> converged{};
  for (int iteration = 0;; ++iteration) {
    newmark_update(c, dt, state, w);
    internal_forces(system, w.u.data(), w.v.data(), state.memory, w.trial, w.internal.data(), w.tangent.data());
    converged = out_of_balance(system, c, before, after, w) <= tolerance;
    if (all(converged) || iteration == newton_limit) break;
    w.solve.factor(system, 1.0, weight * c.gamma * dt, weight * c.beta * dt * dt, w.tangent.data());
    w.solve.solve(system, w.residual.data());
    for (int i = 0; i < system.freedoms; ++i) w.a[i] += select(converged, splat<R>(0), w.residual[i]);
  }
  if (!all(converged)) return converged;
  std::swap(state.u, w.u);
  std::swap(state.v, w.v);
  std::swap(state.a, w.a);
  std::swap(state.memory, w.trial);
  return converged;
}

}  // namespace pilotis
