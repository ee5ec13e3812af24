// RotD50 and RotD100 of two horizontal components: the median and the largest, over all horizontal directions, of the
// peak displacement of an oscillator (and so of the pseudo-acceleration, omega^2 times that). The two displacements are
// combined at every instant, u(a) = u1 cos a + u2 sin a, for a = 0, 1, ... 179 degrees; each period has its own angles.
// The median of the 180 peaks is the mean of the two in the middle.
// Source: Boore, "Orientation-independent, nongeometric-mean measures of seismic intensity from two horizontal
// components of motion", Bull. Seism. Soc. Am. 100 (2010) 1830.
//
// T = 0: the same of the ground acceleration. Step rule and free vibration as for one component
// (oscillator_extremes.hpp).
#pragma once

#include <vector>

#include "core/motion/spectra/oscillator_extremes.hpp"

namespace pilotis {

// Of an oscillator's displacement, m; of the acceleration, m/s2, for T = 0.
struct RotatedPeak {
  double least = 0;              // RotD00
  double median = 0;             // RotD50
  double largest = 0;            // RotD100
  int direction_of_largest = 0;  // degrees from component 1 towards component 2, 0 to 179; the first where several are
};

// The flat function: peaks as many as oscillators, in their order. Both components have the same step, first sample
// time and number of samples. Where the response overflows, an oscillator's numbers are NaN. Throws Error (input) at
// `where`. Reentrant; allocates a few hundred kB.
void rotated_peaks(const Ground& first, const Ground& second, std::span<const Oscillator> oscillators,
                   const StepRule& rule, std::span<RotatedPeak> peaks, const std::string& where,
                   InstructionSet set = chosen_instruction_set());

// Everything [period].
struct RotatedSpectrum {
  double damping_ratio;                             // -
  std::vector<double> periods;                      // s
  std::vector<RotatedPeak> displacement;            // m; zeros at T = 0, but for the direction
  std::vector<double> median_pseudo_acceleration;   // PSA RotD50, m/s2
  std::vector<double> largest_pseudo_acceleration;  // PSA RotD100, m/s2
};
RotatedSpectrum rotated_spectrum(const Ground& first, const Ground& second, std::span<const double> periods,
                                 double damping_ratio, const std::string& where, const StepRule& rule = {});

}  // namespace pilotis
