// The extremes of many oscillators over one ground: the flat function under every elastic spectrum.
// Exact at the ends of the steps (Nigam & Jennings 1969, recurrence.hpp); the step rule stands in oscillator.hpp. The
// free vibration after the ground has come to rest is taken in closed form to its end, so nothing that still comes is
// missed. Reentrant; allocates one bundle per eight oscillators and a block of ground, nothing per step. An oscillator
// has the same bits in any company, on any thread and with any instruction set.
#pragma once

#include <span>

#include "core/lanes/instruction_set.hpp"
#include "core/motion/spectra/oscillator.hpp"

namespace pilotis {

// Lowest and highest, which enclose the 0 of the start.
struct Extremes {
  double low = 0, high = 0;
  double largest() const { return -low > high ? -low : high; }  // magnitude
};

struct OscillatorExtremes {
  Extremes displacement;  // m, relative to the ground
  Extremes velocity;      // m/s, relative to the ground
  Extremes acceleration;  // m/s2, absolute
};

// extremes: as many as oscillators, in their order. Where the response overflows, all of an oscillator's numbers are
// NaN. Throws Error (input) at `where` when something is not as oscillator.hpp wants it.
void oscillator_extremes(const Ground& ground, std::span<const Oscillator> oscillators, const StepRule& rule,
                         std::span<OscillatorExtremes> extremes, const std::string& where,
                         InstructionSet set = chosen_instruction_set());

}  // namespace pilotis
