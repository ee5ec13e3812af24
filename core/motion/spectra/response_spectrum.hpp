// Elastic response spectra of an acceleration series, of the ground or of a floor.
//
//   SD  = max |u|,  SV = max |u'|,  SA = max |u'' + a_g|    the true ones, relative, relative and absolute
//   PSV = omega SD,  PSA = omega^2 SD                       the pseudo ones
//
// T = 0: SD = SV = PSV = 0 and SA = PSA = the peak of the series. Definitions: Chopra, "Dynamics of Structures", ch. 6
// (from memory). How the extremes are found, and the step rule: oscillator_extremes.hpp, oscillator.hpp.
#pragma once

#include <vector>

#include "core/motion/spectra/oscillator_extremes.hpp"

namespace pilotis {

// One curve: everything [period].
struct SpectrumCurve {
  double damping_ratio;                      // -
  std::vector<double> displacement;          // SD, m
  std::vector<double> velocity;              // SV, m/s
  std::vector<double> acceleration;          // SA, m/s2
  std::vector<double> pseudo_velocity;       // PSV, m/s
  std::vector<double> pseudo_acceleration;   // PSA, m/s2
  std::vector<OscillatorExtremes> extremes;  // with their signs
};

struct ResponseSpectrum {
  std::vector<double> periods;        // s, as asked for
  std::vector<SpectrumCurve> curves;  // [damping ratio], as asked for
};

// Periods in s, damping ratios without dimension, in any order, at least one of each. Throws Error (input) at `where`
// when one is out of range (oscillator.hpp).
ResponseSpectrum response_spectrum(const Ground& ground, std::span<const double> periods,
                                   std::span<const double> damping_ratios, const std::string& where,
                                   const StepRule& rule = {});

// The product of periods and damping ratios, [damping ratio][period], as the flat functions take it.
std::vector<Oscillator> oscillators_of(std::span<const double> periods, std::span<const double> damping_ratios);

// `count` periods (s) from shortest to longest, both included, in equal ratios: T_i = shortest
// (longest/shortest)^(i/(count-1)). Throws Error (input) at `where` unless 0 < shortest < longest and count >= 2.
std::vector<double> period_grid(double shortest, double longest, int count, const std::string& where);
// The usual grid where none is asked for: 0 (the peak acceleration), then 200 periods from 0.01 s to 10 s. Common
// practice.
std::vector<double> standard_periods();

}  // namespace pilotis
