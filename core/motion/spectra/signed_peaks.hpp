// The largest displacement of each of many oscillators with its sign and its time, for whoever places something at a
// peak (core/motion/fit/match.hpp). Its magnitude has the bits of the spectra: the same recurrence, step rule and free
// vibration (oscillator_extremes.hpp), only that here every step is kept for a moment.
#pragma once

#include <vector>

#include "core/motion/spectra/oscillator_extremes.hpp"

namespace pilotis {

struct SignedPeak {
  double displacement = 0;  // m, relative to the ground
  double time = 0;          // s from t = 0, at the end of a step or in the free vibration after the ground has stopped
};

// One for each oscillator, in their order; periods > 0. Of equal magnitudes the first; where the response overflows,
// the displacement is NaN. Throws Error (input) at `where` when something is not as oscillator.hpp wants it, or a
// period is 0.
std::vector<SignedPeak> signed_peaks(const Ground& ground, std::span<const Oscillator> oscillators,
                                     const std::string& where, const StepRule& rule = {},
                                     InstructionSet set = chosen_instruction_set());

}  // namespace pilotis
