// Compiled once per instruction set (core/lanes/kernels.cmake).
#include "tests/bench/chain_kernel.hpp"

#include <algorithm>
#include <cmath>

#include "integrators/implicit_step.hpp"

namespace pilotis::PILOTIS_INSTRUCTION_SET {

namespace {

using R = Pack<PILOTIS_LANES>;

R factors_of(const bench::ChainJob& job) {
  R factor = splat<R>(0);
  for (int i = 0; i < PILOTIS_LANES; ++i) set_lane(factor, i, job.factors[i]);
  return factor;
}

void store_peaks(const std::vector<R>& peaks, bench::ChainJob& job) {
  job.peaks.clear();
  for (const R& peak : peaks)
    for (int i = 0; i < PILOTIS_LANES; ++i) job.peaks.push_back(lane(peak, i));
}

// Everything the chain needs, story by story.
struct Chain {
  explicit Chain(const System& system) : n(system.freedoms), mass(system.mass), diagonal(n), beside(n) {
    const auto& group = std::get<ElementGroup<Bilinear>>(system.groups);
    for (int i = 0; i < n; ++i) {
      const Bilinear& law = group.laws[i];
      backbone.push_back(law.backbone), k.push_back(law.slider.stiffness), strength.push_back(law.slider.strength),
          flexibility.push_back(law.slider.flexibility);
      diagonal[i] = system.damping.at(i, i);
      beside[i] = i + 1 < n ? system.damping.at(i + 1, i) : 0;
    }
  }
  int n;
  std::vector<double> mass, diagonal, beside, backbone, k, strength, flexibility;
};

}  // namespace

// Tangents and story forces in one pass from the ground up, elimination from the ground up, substitution down.
void chain_march(bench::ChainJob& job) {
  const Chain c(*job.system);
  const int n = c.n;
  const double dt = job.dt, c_c = 0.5 * dt, c_k = 0.25 * dt * dt;
  const R factor = factors_of(job), zero = splat<R>(0);
  std::vector<R> u(n, zero), v(u), a(u), slip(u), u1(u), v1(u), a1(u), trial(u), tangent(u), residual(u), pivot(u),
      below(u), peaks(u), u_fixed(u), v_fixed(u);
  for (int i = 0; i < n; ++i) a[i] = -factor * (*job.ground)[0];
  for (std::size_t step = 1; step < job.ground->size(); ++step) {
    const R ground = factor * (*job.ground)[step];
    for (int i = 0; i < n; ++i) {
      u_fixed[i] = u[i] + dt * v[i] + c_k * a[i];
      v_fixed[i] = v[i] + c_c * a[i];
      a1[i] = a[i];
    }
    for (int iteration = 0; iteration < newton_limit; ++iteration) {
      ++job.iterations;
      for (int i = 0; i < n; ++i) {
        u1[i] = u_fixed[i] + c_k * a1[i];
        v1[i] = v_fixed[i] + c_c * a1[i];
      }
      R largest = zero;
      for (int i = 0; i < n; ++i) {
        const R drift = i > 0 ? R(u1[i] - u1[i - 1]) : u1[i];
        const R elastic = c.k[i] * (drift - slip[i]);
        const R bounded = lane_max<R>(lane_min<R>(elastic, splat<R>(c.strength[i])), splat<R>(-c.strength[i]));
        const auto slips = lane_abs<R>(elastic) > c.strength[i];
        trial[i] = select(slips, R(drift - bounded * c.flexibility[i]), slip[i]);
        tangent[i] = c.backbone[i] + select(slips, zero, splat<R>(c.k[i]));
        const R force = c.backbone[i] * drift + bounded;
        if (i > 0) residual[i - 1] = residual[i - 1] + force;
        residual[i] = -c.mass[i] * (ground + a1[i]) - force;
      }
      for (int i = 0; i < n; ++i) {
        R damping = c.diagonal[i] * v1[i];
        if (i > 0) damping += c.beside[i - 1] * v1[i - 1];
        if (i + 1 < n) damping += c.beside[i] * v1[i + 1];
        residual[i] -= damping;
        largest = lane_max<R>(largest, lane_abs<R>(residual[i]));
      }
      const auto converged = largest <= job.tolerance;
      if (all(converged)) break;
      R factor_below = zero, off = zero, carried = zero;
      for (int i = 0; i < n; ++i) {
        R d = c.mass[i] + c_c * c.diagonal[i] + c_k * tangent[i];
        if (i + 1 < n) d += c_k * tangent[i + 1];
        d -= factor_below * off;
        residual[i] -= factor_below * carried;
        carried = residual[i];
        pivot[i] = 1.0 / d;
        if (i + 1 < n) {
          off = c_c * c.beside[i] - c_k * tangent[i + 1];
          factor_below = off * pivot[i];
          below[i] = factor_below;
        }
      }
      R above = zero;
      for (int i = n - 1; i >= 0; --i) {
        above = residual[i] * pivot[i] - (i + 1 < n ? R(below[i] * above) : zero);
        a1[i] = select(converged, a1[i], R(a1[i] + above));
      }
    }
    std::swap(u, u1), std::swap(v, v1), std::swap(a, a1), std::swap(slip, trial);
    for (int i = 0; i < n; ++i) peaks[i] = lane_max<R>(peaks[i], lane_abs<R>(i > 0 ? R(u[i] - u[i - 1]) : u[i]));
  }
  store_peaks(peaks, job);
}

void general_march(bench::ChainJob& job) {
  const System& system = *job.system;
  const ImplicitCoefficients average;
  const R factor = factors_of(job), dt = splat<R>(job.dt), tolerance = splat<R>(job.tolerance);
  State<R> state = state_at_rest<R>(system);
  ImplicitWorkspace<R> workspace(system);
  std::vector<R> before(system.freedoms), after(system.freedoms), peaks(system.stories.height.size(), splat<R>(0));
  const auto load = [&](std::size_t step, std::vector<R>& p) {
    for (int i = 0; i < system.freedoms; ++i)
      p[i] = -system.mass[i] * system.influence[i] * (factor * (*job.ground)[step]);
  };
  load(0, before);
  for (int i = 0; i < system.freedoms; ++i) state.a[i] = before[i] / system.mass[i];
  for (std::size_t step = 1; step < job.ground->size(); ++step) {
    load(step, after);
    implicit_step(system, average, dt, tolerance, before.data(), after.data(), state, workspace);
    std::swap(before, after);
    for (std::size_t i = 0; i < peaks.size(); ++i)
      peaks[i] = lane_max<R>(peaks[i], lane_abs<R>(workspace.forces.deformation[system.stories.spring[i]]));
  }
  store_peaks(peaks, job);
}

}  // namespace pilotis::PILOTIS_INSTRUCTION_SET
