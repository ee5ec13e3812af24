#include "core/motion/spectra/bundles.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "core/motion/spectra/free_vibration.hpp"
#include "core/motion/spectra/recurrence.hpp"

namespace pilotis {

namespace {

void put(OscillatorBundle& bundle, int lane, const Oscillator& oscillator, double step) {
  const Recurrence r = recurrence(oscillator, step);
  bundle.a_uu[lane] = r.a_uu;
  bundle.a_uv[lane] = r.a_uv;
  bundle.a_vu[lane] = r.a_vu;
  bundle.a_vv[lane] = r.a_vv;
  bundle.b_u0[lane] = r.b_u0;
  bundle.b_u1[lane] = r.b_u1;
  bundle.b_v0[lane] = r.b_v0;
  bundle.b_v1[lane] = r.b_v1;
  bundle.damping[lane] = -2 * oscillator.damping_ratio * r.omega;
  bundle.stiffness[lane] = -r.omega * r.omega;
}

Extremes widened(double low, double high, const Swing& swing) {
  return {std::min({low, swing.first, swing.second}), std::max({high, swing.first, swing.second})};
}

}  // namespace

std::vector<OscillatorBundle> bundles_at_rest(std::span<const Oscillator> oscillators, std::span<const int> members,
                                              double step) {
  constexpr int lanes = OscillatorBundle::lanes;
  std::vector<OscillatorBundle> bundles((members.size() + lanes - 1) / lanes);  // zeros: at rest
  for (std::size_t i = 0; i < bundles.size() * lanes; ++i)
    put(bundles[i / lanes], static_cast<int>(i % lanes), oscillators[members[std::min(i, members.size() - 1)]], step);
  return bundles;
}

OscillatorExtremes extremes_of(const OscillatorBundle& bundle, int lane, const Oscillator& oscillator) {
  const double u = bundle.u[lane], v = bundle.v[lane];
  // A state that is not finite stays so to the end, while comparisons with NaN leave no trace in the extremes.
  if (!std::isfinite(u) || !std::isfinite(v)) {
    constexpr Extremes nothing{std::numeric_limits<double>::quiet_NaN(), std::numeric_limits<double>::quiet_NaN()};
    return {nothing, nothing, nothing};
  }
  const double damping = bundle.damping[lane], stiffness = bundle.stiffness[lane];
  const double a = damping * v + stiffness * u;  // with the ground at rest the relative and the absolute one
  return {widened(bundle.u_low[lane], bundle.u_high[lane], free_vibration(oscillator, u, v)),
          widened(bundle.v_low[lane], bundle.v_high[lane], free_vibration(oscillator, v, a)),
          widened(bundle.a_low[lane], bundle.a_high[lane], free_vibration(oscillator, a, damping * a + stiffness * v))};
}

std::vector<int> subdivisions(std::span<const Oscillator> oscillators, double step, const StepRule& rule) {
  std::vector<int> pieces;
  pieces.reserve(oscillators.size());
  for (const Oscillator& oscillator : oscillators) pieces.push_back(subdivision(oscillator.period, step, rule));
  return pieces;
}

}  // namespace pilotis
