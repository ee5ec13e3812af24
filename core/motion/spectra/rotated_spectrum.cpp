#include "core/motion/spectra/rotated_spectrum.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/spectra/bundles.hpp"
#include "core/motion/spectra/fine_ground.hpp"
#include "core/motion/spectra/free_vibration.hpp"
#include "core/motion/spectra/lane_groups.hpp"
#include "core/motion/spectra/response_spectrum.hpp"
#include "core/motion/spectra/rotation_envelope.hpp"
#include "core/motion/spectra/spectra_kernels.hpp"

namespace pilotis {

namespace {

constexpr int per_bundle = OscillatorBundle::lanes;
using Kernel = decltype(PILOTIS_KERNELS(march_displacements))::value_type;

void validate_pair(const Ground& first, const Ground& second, const std::string& where) {
  validate(first, where);
  validate(second, where);
  if (first.step != second.step || first.samples.size() != second.samples.size() ||
      first.first_sample_at != second.first_sample_at)
    throw input_error(
        where,
        fmt::format("found components of {} samples every {:g} s from {:g} s and {} every {:g} s from {:g} s",
                    first.samples.size(), first.step, first.first_sample_at, second.samples.size(), second.step,
                    second.first_sample_at),
        "both must have the same samples in time; cut or resample one of them");
}

RotatedPeak peak_of(const RotationEnvelope& envelope) {
  auto sorted = envelope.peaks();
  const int most = static_cast<int>(std::max_element(sorted.begin(), sorted.end()) - sorted.begin());
  std::sort(sorted.begin(), sorted.end());
  constexpr int half = RotationEnvelope::angles / 2;
  return {sorted.front(), 0.5 * (sorted[half - 1] + sorted[half]), sorted.back(), most};
}

RotatedPeak rigid(const Ground& first, const Ground& second) {
  RotationEnvelope envelope;
  envelope.see(first.samples.data(), second.samples.data(), static_cast<int>(first.samples.size()), 1);
  return peak_of(envelope);
}

// The free vibration in a direction starts from the state in that direction.
RotatedPeak finished(RotationEnvelope& envelope, const OscillatorBundle& first, const OscillatorBundle& second,
                     int lane, const Oscillator& oscillator) {
  const double state[4] = {first.u[lane], second.u[lane], first.v[lane], second.v[lane]};
  for (const double s : state)
    if (!std::isfinite(s)) {
      constexpr double nothing = std::numeric_limits<double>::quiet_NaN();
      return {nothing, nothing, nothing, 0};
    }
  for (int angle = 0; angle < RotationEnvelope::angles; ++angle) {
    const auto [c, s] = directions()[angle];
    const Swing swing = free_vibration(oscillator, state[0] * c + state[1] * s, state[2] * c + state[3] * s);
    envelope.raise(angle, std::max(std::abs(swing.first), std::abs(swing.second)));
  }
  return peak_of(envelope);
}

// Eight oscillators on both components, block by block.
class BundlePair {
 public:
  BundlePair(const Ground& first, const Ground& second, int pieces)
      : first_(first, pieces),
        second_(second, pieces),
        u1_(static_cast<std::size_t>(first_.longest_block()) * per_bundle),
        u2_(u1_.size()) {}

  double step() const { return first_.step(); }

  void march(Kernel kernel, OscillatorBundle& one, OscillatorBundle& two, std::span<RotationEnvelope> envelopes) {
    for (long block = 0; block < first_.blocks(); ++block) {
      const auto p1 = first_.block(block), p2 = second_.block(block);
      const int steps = static_cast<int>(p1.size()) - 1;
      kernel(p1.data(), steps, one, u1_.data());
      kernel(p2.data(), steps, two, u2_.data());
      for (std::size_t lane = 0; lane < envelopes.size(); ++lane)
        envelopes[lane].see(u1_.data() + lane, u2_.data() + lane, steps, per_bundle);
    }
  }

 private:
  FineGround first_, second_;
  std::vector<double> u1_, u2_;  // m, [step][lane]
};

void march_group(const Ground& first, const Ground& second, std::span<const Oscillator> oscillators, int pieces,
                 std::span<const int> members, std::span<RotatedPeak> peaks, Kernel kernel) {
  BundlePair pair(first, second, pieces);
  std::vector<OscillatorBundle> one = bundles_at_rest(oscillators, members, pair.step()), two = one;
  for (std::size_t b = 0; b < one.size(); ++b) {
    const auto here =
        members.subspan(b * per_bundle, std::min<std::size_t>(per_bundle, members.size() - b * per_bundle));
    std::array<RotationEnvelope, per_bundle> envelopes;
    pair.march(kernel, one[b], two[b], std::span(envelopes).first(here.size()));
    for (std::size_t lane = 0; lane < here.size(); ++lane)
      peaks[here[lane]] = finished(envelopes[lane], one[b], two[b], static_cast<int>(lane), oscillators[here[lane]]);
  }
}

}  // namespace

void rotated_peaks(const Ground& first, const Ground& second, std::span<const Oscillator> oscillators,
                   const StepRule& rule, std::span<RotatedPeak> peaks, const std::string& where, InstructionSet set) {
  validate_pair(first, second, where);
  validate(rule, where);
  validate(oscillators, first.step, where);
  if (peaks.size() != oscillators.size())
    throw input_error(where, fmt::format("found room for {} of {} oscillators", peaks.size(), oscillators.size()),
                      "there must be one place for each");
  const Kernel kernel = PILOTIS_KERNELS(march_displacements)[static_cast<std::size_t>(set)];
  each_lane_group(subdivisions(oscillators, first.step, rule), [&](int pieces, std::span<const int> members) {
    if (pieces > 0) return march_group(first, second, oscillators, pieces, members, peaks, kernel);
    const RotatedPeak ground = rigid(first, second);
    for (const int member : members) peaks[member] = ground;
  });
}

RotatedSpectrum rotated_spectrum(const Ground& first, const Ground& second, std::span<const double> periods,
                                 double damping_ratio, const std::string& where, const StepRule& rule) {
  RotatedSpectrum spectrum{damping_ratio, {periods.begin(), periods.end()}, {}, {}, {}};
  spectrum.displacement.resize(periods.size());
  rotated_peaks(first, second, oscillators_of(periods, {&damping_ratio, 1}), rule, spectrum.displacement, where);
  for (std::size_t i = 0; i < periods.size(); ++i) {
    const bool rigid = periods[i] == 0;
    const double omega = rigid ? 1 : 2 * std::numbers::pi / periods[i];
    RotatedPeak& peak = spectrum.displacement[i];
    spectrum.median_pseudo_acceleration.push_back(omega * omega * peak.median);
    spectrum.largest_pseudo_acceleration.push_back(omega * omega * peak.largest);
    if (rigid) peak = {0, 0, 0, peak.direction_of_largest};
  }
  return spectrum;
}

}  // namespace pilotis
