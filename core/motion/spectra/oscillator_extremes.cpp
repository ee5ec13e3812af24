#include "core/motion/spectra/oscillator_extremes.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "core/error.hpp"
#include "core/motion/spectra/bundles.hpp"
#include "core/motion/spectra/fine_ground.hpp"
#include "core/motion/spectra/lane_groups.hpp"
#include "core/motion/spectra/spectra_kernels.hpp"

namespace pilotis {

namespace {

// The rigid oscillator rides on the ground.
OscillatorExtremes rigid(const Ground& ground) {
  Extremes acceleration;
  for (const double a : ground.samples) {
    acceleration.low = std::min(acceleration.low, a);
    acceleration.high = std::max(acceleration.high, a);
  }
  return {{}, {}, acceleration};
}

}  // namespace

void oscillator_extremes(const Ground& ground, std::span<const Oscillator> oscillators, const StepRule& rule,
                         std::span<OscillatorExtremes> extremes, const std::string& where, InstructionSet set) {
  validate(ground, where);
  validate(rule, where);
  validate(oscillators, ground.step, where);
  if (extremes.size() != oscillators.size())
    throw input_error(where, fmt::format("found room for {} of {} oscillators", extremes.size(), oscillators.size()),
                      "there must be one place for each");
  const auto march = PILOTIS_KERNELS(march_extremes)[static_cast<std::size_t>(set)];
  constexpr int lanes = OscillatorBundle::lanes;
  each_lane_group(subdivisions(oscillators, ground.step, rule), [&](int pieces, std::span<const int> members) {
    if (pieces == 0) {
      for (const int member : members) extremes[member] = rigid(ground);
      return;
    }
    FineGround fine(ground, pieces);
    std::vector<OscillatorBundle> bundles = bundles_at_rest(oscillators, members, fine.step());
    for (long block = 0; block < fine.blocks(); ++block) {
      const std::span<const double> p = fine.block(block);
      march(p.data(), static_cast<int>(p.size()) - 1, bundles.data(), static_cast<int>(bundles.size()));
    }
    for (std::size_t i = 0; i < members.size(); ++i)
      extremes[members[i]] = extremes_of(bundles[i / lanes], static_cast<int>(i % lanes), oscillators[members[i]]);
  });
}

}  // namespace pilotis
