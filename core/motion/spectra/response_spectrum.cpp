#include "core/motion/spectra/response_spectrum.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"

namespace pilotis {

namespace {

SpectrumCurve curve_of(double damping_ratio, std::span<const double> periods,
                       std::span<const OscillatorExtremes> extremes) {
  SpectrumCurve curve{damping_ratio, {}, {}, {}, {}, {}, {extremes.begin(), extremes.end()}};
  for (std::size_t i = 0; i < periods.size(); ++i) {
    const double sd = extremes[i].displacement.largest(), sa = extremes[i].acceleration.largest();
    const bool rigid = periods[i] == 0;
    const double omega = rigid ? 0 : 2 * std::numbers::pi / periods[i];
    curve.displacement.push_back(sd);
    curve.velocity.push_back(extremes[i].velocity.largest());
    curve.acceleration.push_back(sa);
    curve.pseudo_velocity.push_back(omega * sd);
    curve.pseudo_acceleration.push_back(rigid ? sa : omega * omega * sd);
  }
  return curve;
}

}  // namespace

std::vector<Oscillator> oscillators_of(std::span<const double> periods, std::span<const double> damping_ratios) {
  std::vector<Oscillator> oscillators;
  oscillators.reserve(periods.size() * damping_ratios.size());
  for (const double damping : damping_ratios)
    for (const double period : periods) oscillators.push_back({period, damping});
  return oscillators;
}

ResponseSpectrum response_spectrum(const Ground& ground, std::span<const double> periods,
                                   std::span<const double> damping_ratios, const std::string& where,
                                   const StepRule& rule) {
  if (periods.empty() || damping_ratios.empty())
    throw input_error(where,
                      fmt::format("found {} periods and {} damping ratios", periods.size(), damping_ratios.size()),
                      "at least one of each is needed");
  const std::vector<Oscillator> oscillators = oscillators_of(periods, damping_ratios);
  std::vector<OscillatorExtremes> extremes(oscillators.size());
  oscillator_extremes(ground, oscillators, rule, extremes, where);
  ResponseSpectrum spectrum{{periods.begin(), periods.end()}, {}};
  for (std::size_t i = 0; i < damping_ratios.size(); ++i)
    spectrum.curves.push_back(
        curve_of(damping_ratios[i], periods, std::span(extremes).subspan(i * periods.size(), periods.size())));
  return spectrum;
}

std::vector<double> period_grid(double shortest, double longest, int count, const std::string& where) {
  if (!(shortest > 0 && shortest < longest && std::isfinite(longest)) || count < 2)
    throw input_error(where, fmt::format("found {} periods from {:g} s to {:g} s", count, shortest, longest),
                      "at least two are needed, from above 0 s to a longer one");
  std::vector<double> periods;
  for (int i = 0; i < count; ++i) periods.push_back(shortest * std::pow(longest / shortest, double(i) / (count - 1)));
  periods.back() = longest;
  return periods;
}

std::vector<double> standard_periods() {
  std::vector<double> periods = period_grid(0.01, 10, 200, "standard periods");
  periods.insert(periods.begin(), 0.0);
  return periods;
}

}  // namespace pilotis
