#include "core/motion/spectra/signed_peaks.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "core/error.hpp"
#include "core/motion/spectra/bundles.hpp"
#include "core/motion/spectra/fine_ground.hpp"
#include "core/motion/spectra/free_vibration.hpp"
#include "core/motion/spectra/lane_groups.hpp"
#include "core/motion/spectra/spectra_kernels.hpp"

namespace pilotis {

namespace {

constexpr int per_bundle = OscillatorBundle::lanes;
using Kernel = decltype(PILOTIS_KERNELS(march_displacements))::value_type;

void raise(SignedPeak& peak, double displacement, double time) {
  if (std::abs(displacement) > std::abs(peak.displacement)) peak = {displacement, time};
}

// The swings after the ground has stopped at `end`, s; NaN where the state is not finite.
void finish(SignedPeak& peak, const OscillatorBundle& bundle, int lane, const Oscillator& oscillator, double end) {
  const double u = bundle.u[lane], v = bundle.v[lane];
  if (!std::isfinite(u) || !std::isfinite(v)) {
    peak.displacement = std::numeric_limits<double>::quiet_NaN();
    return;
  }
  const Swing swing = free_vibration(oscillator, u, v);
  raise(peak, swing.first, end + swing.first_at);  // the second is smaller
}

// All members of one fraction of the step, eight at a time.
void march_group(const Ground& ground, std::span<const Oscillator> oscillators, int pieces,
                 std::span<const int> members, std::span<SignedPeak> peaks, Kernel kernel) {
  FineGround fine(ground, pieces);
  std::vector<OscillatorBundle> bundles = bundles_at_rest(oscillators, members, fine.step());
  std::vector<double> u(static_cast<std::size_t>(fine.longest_block()) * per_bundle);  // m, [step][lane]
  long before = 0;                                                                     // steps of the blocks behind
  for (long block = 0; block < fine.blocks(); ++block) {
    const std::span<const double> p = fine.block(block);
    const int steps = static_cast<int>(p.size()) - 1;
    for (std::size_t i = 0; i < members.size(); ++i) {
      const int lane = static_cast<int>(i % per_bundle);
      if (lane == 0) kernel(p.data(), steps, bundles[i / per_bundle], u.data());
      for (int k = 0; k < steps; ++k)
        raise(peaks[members[i]], u[k * per_bundle + lane], fine.step() * static_cast<double>(before + k + 1));
    }
    before += steps;
  }
  for (std::size_t i = 0; i < members.size(); ++i)
    finish(peaks[members[i]], bundles[i / per_bundle], static_cast<int>(i % per_bundle), oscillators[members[i]],
           fine.step() * static_cast<double>(before));
}

}  // namespace

std::vector<SignedPeak> signed_peaks(const Ground& ground, std::span<const Oscillator> oscillators,
                                     const std::string& where, const StepRule& rule, InstructionSet set) {
  validate(ground, where);
  validate(rule, where);
  validate(oscillators, ground.step, where);
  for (const Oscillator& oscillator : oscillators)
    if (oscillator.period == 0)
      throw input_error(where, "found a period of 0 s",
                        "it must be greater than 0 s: a rigid oscillator does not move");
  std::vector<SignedPeak> peaks(oscillators.size());
  const Kernel kernel = PILOTIS_KERNELS(march_displacements)[static_cast<std::size_t>(set)];
  each_lane_group(subdivisions(oscillators, ground.step, rule), [&](int pieces, std::span<const int> members) {
    march_group(ground, oscillators, pieces, members, peaks, kernel);
  });
  return peaks;
}

}  // namespace pilotis
