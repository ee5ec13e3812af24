// Fourier amplitude spectrum of an accelerogram, its smoothing, and the mean period.
#pragma once

#include <vector>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// |F(f)| = step |sum_n a_n exp(-2 pi i f n step)|, the Fourier integral by the sum over the samples, up to the Nyquist
// frequency. Zeros behind the record make the frequencies close; they add nothing to F.
struct FourierAmplitudes {
  std::vector<double> frequencies;  // Hz, evenly spaced from 0
  std::vector<double> amplitudes;   // m/s, at each of them
};

// `spacing` (Hz, > 0) is the largest distance of two frequencies.
FourierAmplitudes fourier_amplitudes(const Accelerogram& record, double spacing);

// Each amplitude replaced by the mean of all with the weights (sin(x) / x)^4, x = b log10(f / f_c): b = 40 is usual, a
// smaller b (> 0) smooths more. The one at f = 0 stays and is no part of the others. Source: Konno & Ohmachi 1998,
// Bulletin of the Seismological Society of America 88, 228. Time grows with the square of the number of frequencies.
FourierAmplitudes smoothed(const FourierAmplitudes& spectrum, double b);

// s: sum(C_i^2 / f_i) / sum(C_i^2) over the Fourier amplitudes C_i at 0.25 Hz <= f_i <= 20 Hz (to the Nyquist frequency
// where that is lower), 0.05 Hz apart or less; 0 when all are 0. Source: Rathje, Abrahamson & Bray 1998, Journal of
// Geotechnical and Geoenvironmental Engineering 124, 150; the spacing: Rathje et al. 2004, Earthquake Spectra 20, 119
// (from memory).
double mean_period(const Accelerogram& record);

}  // namespace pilotis
