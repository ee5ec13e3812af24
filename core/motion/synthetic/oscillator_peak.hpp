// The largest response of single oscillators to an accelerogram, with its sign and its time: a plain loop, one period
// after the other, for making and matching motions.
//
// Exact for acceleration taken linear between samples (as Nigam & Jennings 1969, Bulletin of the Seismological Society
// of America 59, 909). Extremes are looked for at the samples and, for short periods, at equal parts of the step so
// that a period has at least ten; between those an extreme can be missed by 5 % at most, (pi / 10)^2 / 2. The motion
// ends with its last sample.
#pragma once

#include <functional>
#include <span>
#include <vector>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

struct OscillatorPeak {
  double pseudo_acceleration = 0;  // omega^2 u at the largest |u|, with its sign, m/s2
  double time = 0;                 // s
};

// For each period (s, > 0) in order; damping ratio in (0, 1).
std::vector<OscillatorPeak> oscillator_peaks(const Accelerogram& record, std::span<const double> periods,
                                             double damping);

// How the makers of motions ask for a spectrum: any function that answers as oscillator_peaks does.
using SpectrumFunction =
    std::function<std::vector<OscillatorPeak>(const Accelerogram&, std::span<const double>, double)>;

// `count` periods, s, in equal ratios from `shortest` to `longest`.
std::vector<double> equal_ratios(double shortest, double longest, std::size_t count);

}  // namespace pilotis
