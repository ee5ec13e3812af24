#include "core/motion/spectra/inelastic_spectrum.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

// Far above any response of a finite record to its peak acceleration: such an oscillator stays elastic.
constexpr double never_yields = 1e9;

std::vector<BilinearOscillator> with_yield(std::span<const Oscillator> oscillators, double yield_acceleration) {
  std::vector<BilinearOscillator> yielding;
  for (const Oscillator& o : oscillators) yielding.push_back({o.period, o.damping_ratio, yield_acceleration});
  return yielding;
}

double peak_acceleration(const Ground& ground) {
  double peak = 0;
  for (const double a : ground.samples) peak = std::max(peak, std::abs(a));
  return peak;
}

// The searches that still run, eight strengths each, marched together.
void try_strengths(const Ground& ground, double post_yield_ratio, std::span<const BilinearOscillator> elastic,
                   std::vector<StrengthSearch>& searches, const std::string& where, const StepRule& rule) {
  constexpr int tries = StrengthSearch::tries;
  std::vector<BilinearOscillator> tried;
  for (std::size_t i = 0; i < searches.size(); ++i)
    if (!searches[i].done())
      for (const double ratio : searches[i].next()) {
        tried.push_back(elastic[i]);
        tried.back().yield_acceleration *= ratio;
      }
  std::vector<BilinearPeak> peaks(tried.size());
  bilinear_peaks(ground, post_yield_ratio, tried, peaks, where, rule);
  const BilinearPeak* next = peaks.data();
  for (StrengthSearch& search : searches)
    if (!search.done()) {
      search.take(std::span<const BilinearPeak, tries>(next, tries));
      next += tries;
    }
}

}  // namespace

std::vector<BilinearOscillator> with_strength_ratio(const Ground& ground, std::span<const Oscillator> oscillators,
                                                    double strength_ratio, const std::string& where,
                                                    const StepRule& rule) {
  validate(ground, where);
  const double peak = peak_acceleration(ground);
  if (peak == 0) throw input_error(where, "found a ground that does not move", "a strength ratio needs a motion");
  if (!(strength_ratio > 0 && std::isfinite(strength_ratio)))
    throw input_error(where, fmt::format("found a strength ratio of {:g}", strength_ratio), "it must be above 0");
  std::vector<BilinearOscillator> yielding = with_yield(oscillators, never_yields * peak);
  std::vector<BilinearPeak> elastic(yielding.size());
  bilinear_peaks(ground, 0, yielding, elastic, where, rule);
  for (std::size_t i = 0; i < yielding.size(); ++i)
    yielding[i].yield_acceleration *= strength_ratio * elastic[i].ductility;
  return yielding;
}

std::vector<BilinearPeak> constant_strength_spectrum(const Ground& ground, double post_yield_ratio,
                                                     std::span<const Oscillator> oscillators, double yield_acceleration,
                                                     const std::string& where, const StepRule& rule) {
  std::vector<BilinearPeak> peaks(oscillators.size());
  bilinear_peaks(ground, post_yield_ratio, with_yield(oscillators, yield_acceleration), peaks, where, rule);
  return peaks;
}

std::vector<RequiredStrength> constant_ductility_spectrum(const Ground& ground, double post_yield_ratio,
                                                          std::span<const Oscillator> oscillators, double ductility,
                                                          const std::string& where, const StepRule& rule) {
  if (!(ductility >= 1 && std::isfinite(ductility)))
    throw input_error(where, fmt::format("found a target ductility of {:g}", ductility), "it must be at least 1");
  const std::vector<BilinearOscillator> elastic = with_strength_ratio(ground, oscillators, 1, where, rule);
  std::vector<RequiredStrength> required;
  if (ductility == 1) {
    std::vector<BilinearPeak> peaks(elastic.size());
    bilinear_peaks(ground, post_yield_ratio, elastic, peaks, where, rule);
    for (std::size_t i = 0; i < elastic.size(); ++i)
      required.push_back({StrengthFound::one, elastic[i].yield_acceleration, 1, peaks[i]});
    return required;
  }
  std::vector<StrengthSearch> searches(elastic.size(), StrengthSearch(ductility));
  const auto running = [](const StrengthSearch& search) { return !search.done(); };
  while (std::any_of(searches.begin(), searches.end(), running))
    try_strengths(ground, post_yield_ratio, elastic, searches, where, rule);
  for (std::size_t i = 0; i < elastic.size(); ++i)
    required.push_back({searches[i].found(), searches[i].ratio() * elastic[i].yield_acceleration, searches[i].ratio(),
                        searches[i].peak()});
  return required;
}

}  // namespace pilotis
