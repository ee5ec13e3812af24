// Butterworth filters as second-order sections, by the bilinear transform with the corners prewarped, so that the
// digital filter has its -3 dB points exactly at the corners.
//
//     |H(f)|^2 = 1 / (1 + (w/wc)^(2n))  lowpass,   1 / (1 + (wc/w)^(2n))  highpass,   w = (2/dt) tan(pi f dt)
//     bandpass: the lowpass with  s -> (s^2 + w1 w2) / (s (w2 - w1)),  2n poles: order n at either side
//
// Source: Butterworth 1930, Wireless Engineer 7, 536; Oppenheim & Schafer, Discrete-Time Signal Processing, ch. 7 (from
// memory).
#pragma once

#include <span>
#include <vector>

namespace pilotis {

// y_n = b0 x_n + b1 x_(n-1) + b2 x_(n-2) - a1 y_(n-1) - a2 y_(n-2)
struct FilterSection {
  double b0 = 1, b1 = 0, b2 = 0, a1 = 0, a2 = 0;
};

// order >= 1; corners in Hz, 0 < corner < 1/(2 step), low < high; step in s.
std::vector<FilterSection> butterworth_lowpass(int order, double corner, double step);
std::vector<FilterSection> butterworth_highpass(int order, double corner, double step);
std::vector<FilterSection> butterworth_bandpass(int order, double low, double high, double step);

// One pass through all sections, each at rest before the first sample; in place.
void filter_forward(std::span<const FilterSection> sections, std::span<double> samples) noexcept;

// A pass forward and a pass backward, each at rest where it starts: no shift of phase, |H|^2 in place of |H|.
void filter_both_ways(std::span<const FilterSection> sections, std::span<double> samples) noexcept;

// |H| of one pass at `frequency` (Hz); dimensionless.
double filter_gain(std::span<const FilterSection> sections, double frequency, double step);

}  // namespace pilotis
