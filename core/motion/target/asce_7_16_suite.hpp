// What ASCE/SEI 7-16 asks of the ground motions of a nonlinear response history analysis, 16.2 (from memory).
#pragma once

#include <optional>

#include "core/motion/target/suite_clauses.hpp"

namespace pilotis {

enum class MotionFit { amplitude_scaled, spectrally_matched };  // 16.2.3.2, 16.2.3.3

struct Asce716Suite {
  SuiteSpectra maximum_direction;  // 5 % damped, RotD100 of each pair of horizontal components
  MotionFit fit = MotionFit::amplitude_scaled;
  double range_begin = 0, range_end = 0;  // s, the period range chosen, 0 < begin < end
  // s, first-mode periods in the two principal horizontal directions, > 0
  double first_period_x = 0, first_period_y = 0;
  // s, the period of the highest mode needed for 90 % of the mass in each direction; empty: not known
  std::optional<double> period_of_90_percent_mass;
};

// Clause by clause:
//   16.2.2    at least 11 motions; selected to fit tectonic regime, magnitude, distance and shape (for an engineer)
//   16.2.3.1  range up to at least twice the longer first period (down to 1.5 times where justified by analysis); from
//   at
//             most 20 % of the shorter one; the modes of 90 % of the mass in the range
//   16.2.3.2  amplitude scaled: mean of the maximum-direction spectra generally matches or exceeds the target, nowhere
//             below 90 % of it
//   16.2.3.3  matched: that mean at or above 110 % of the target
// `target`: the MCE_R spectrum of 16.2.1. Throws Error (input) at `where` when a value is not as above.
std::vector<ClauseFinding> check_asce_7_16_suite(const Asce716Suite& suite, const TargetSpectrum& target,
                                                 const std::string& where);

}  // namespace pilotis
