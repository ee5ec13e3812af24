// Two horizontal components of one motion taken together: RotD50 and RotD100.
#pragma once

#include "apps/motion/numbers.hpp"
#include "core/motion/spectra/rotated_spectrum.hpp"

namespace pilotis {

struct PairNumbers {
  std::string first, second;             // the components as they are shown
  std::vector<RotatedSpectrum> spectra;  // [damping ratio]; empty: no pair was asked for
};

// The records must hold their samples. Throws Error (input) unless there are exactly two, with the same step, first
// sample time and number of samples.
PairNumbers pair_of(const std::vector<RecordNumbers>& records, const MotionRequest& request);

}  // namespace pilotis
