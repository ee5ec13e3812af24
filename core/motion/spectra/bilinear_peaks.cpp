#include "core/motion/spectra/bilinear_peaks.hpp"

#include <fmt/format.h>

#include <cmath>
#include <limits>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/spectra/bilinear_kernel.hpp"
#include "core/motion/spectra/bundles.hpp"
#include "core/motion/spectra/fine_ground.hpp"
#include "core/motion/spectra/lane_groups.hpp"
#include "core/motion/spectra/spectra_kernels.hpp"

namespace pilotis {

namespace {

constexpr int per_bundle = BilinearBundle::lanes;
constexpr double longest_tail = 100;  // periods

void validate_oscillators(double post_yield_ratio, std::span<const BilinearOscillator> oscillators,
                          const std::string& where) {
  if (!(post_yield_ratio >= 0 && post_yield_ratio < 1))
    throw input_error(where, fmt::format("found a post-yield ratio of {:g}", post_yield_ratio),
                      "it must be at least 0 and below 1");
  for (const BilinearOscillator& o : oscillators) {
    if (o.period == 0) throw input_error(where, "found a period of 0 s", "a yielding oscillator's must be above 0 s");
    if (!(o.yield_acceleration > 0 && std::isfinite(o.yield_acceleration)))
      throw input_error(where, fmt::format("found a yield acceleration of {:g} m/s2", o.yield_acceleration),
                        "it must be finite and above 0");
  }
}

double omega_of(const Oscillator& o) { return 2 * std::numbers::pi / o.period; }

std::vector<BilinearBundle> at_rest(std::span<const BilinearOscillator> oscillators,
                                    std::span<const Oscillator> elastic, std::span<const int> members, double r,
                                    double step) {
  const std::vector<OscillatorBundle> bare = bundles_at_rest(elastic, members, step);
  std::vector<BilinearBundle> bundles(bare.size());
  for (std::size_t i = 0; i < bundles.size() * per_bundle; ++i) {
    BilinearBundle& bundle = bundles[i / per_bundle];
    const int lane = static_cast<int>(i % per_bundle), member = members[std::min(i, members.size() - 1)];
    if (lane == 0) bundle.elastic = bare[i / per_bundle];
    const double square = omega_of(elastic[member]) * omega_of(elastic[member]);
    bundle.ground[lane] = square / oscillators[member].yield_acceleration;
    bundle.pull[lane] = square * (1 - r);
    bundle.relief[lane] = 1 / (1 + bundle.elastic.b_u1[lane] * bundle.pull[lane]);
  }
  return bundles;
}

// Whether what is left stays within the elastic range: it swings about (1 - r) s with no more than this amplitude.
bool spent(const spectra::BilinearPack<double>& x, double r, double omega) {
  const double slip = x.memory.slip;
  const double amplitude = std::hypot(x.elastic.u - (1 - r) * slip, x.elastic.v / omega);
  return r * std::abs(slip) + amplitude <= 1 + 1e-9;
}

// After the record, one oscillator at a time.
void come_to_rest(spectra::BilinearPack<double>& x, double r, const Oscillator& elastic, double step) {
  const Bilinear law{1, 1, r};
  const long most = std::lround(longest_tail * elastic.period / step);
  int reversals = 0;
  for (long i = 0; i < most && !(reversals >= 2 && spent(x, r, omega_of(elastic))); ++i) {
    const double before = x.elastic.v;
    x.advance(law, 0.0, 0.0);
    if (before * x.elastic.v <= 0) ++reversals;
  }
}

BilinearPeak peak_of(const BilinearBundle& bundle, int lane, double r, const Oscillator& elastic, double step) {
  spectra::BilinearPack<double> x(bundle, lane);
  come_to_rest(x, r, elastic, step);
  if (!std::isfinite(x.elastic.u) || !std::isfinite(x.elastic.v)) {
    constexpr double nothing = std::numeric_limits<double>::quiet_NaN();
    return {nothing, nothing, nothing};
  }
  const double extreme = -x.low > x.high ? x.low : x.high, yield = 1 / bundle.ground[lane];
  return {std::abs(extreme), extreme * yield, (1 - r) * x.memory.slip * yield};
}

}  // namespace

void bilinear_peaks(const Ground& ground, double post_yield_ratio, std::span<const BilinearOscillator> oscillators,
                    std::span<BilinearPeak> peaks, const std::string& where, const StepRule& rule, InstructionSet set) {
  validate(ground, where);
  validate(rule, where);
  validate_oscillators(post_yield_ratio, oscillators, where);
  std::vector<Oscillator> elastic;
  for (const BilinearOscillator& o : oscillators) elastic.push_back({o.period, o.damping_ratio});
  validate(elastic, ground.step, where);
  if (peaks.size() != oscillators.size())
    throw input_error(where, fmt::format("found room for {} of {} oscillators", peaks.size(), oscillators.size()),
                      "there must be one place for each");
  const auto march = PILOTIS_KERNELS(march_bilinear)[static_cast<std::size_t>(set)];
  each_lane_group(subdivisions(elastic, ground.step, rule), [&](int pieces, std::span<const int> members) {
    FineGround fine(ground, pieces);
    std::vector<BilinearBundle> bundles = at_rest(oscillators, elastic, members, post_yield_ratio, fine.step());
    for (long block = 0; block < fine.blocks(); ++block) {
      const std::span<const double> p = fine.block(block);
      for (BilinearBundle& bundle : bundles) march(p.data(), static_cast<int>(p.size()) - 1, post_yield_ratio, bundle);
    }
    for (std::size_t i = 0; i < members.size(); ++i)
      peaks[members[i]] = peak_of(bundles[i / per_bundle], static_cast<int>(i % per_bundle), post_yield_ratio,
                                  elastic[members[i]], fine.step());
  });
}

}  // namespace pilotis
