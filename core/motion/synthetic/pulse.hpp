// Simple pulses of acceleration, of textbooks on shock.
//
//     half_sine     A sin(pi s / d)              0 <= s <= d, s = t - start
//     triangular    A (1 - |2 s / d - 1|)         0 <= s <= d
//     rectangular   A                            0 <= s <= d
//     step          A                            0 <= s, to the end of the duration
//
// Samples are joined by straight lines, so a jump takes two steps: the sample at the jump is the mean of both sides,
// which keeps the pulse's impulse. At t = 0 it is the side after. No baseline correction: a pulse leaves the ground
// with a velocity.
#pragma once

#include "core/motion/synthetic/kind.hpp"

namespace pilotis::pulse {

extern const SyntheticKind kind;

// Throws Error (input) when the pulse does not lie within the duration, when a pulse that jumps does not start and end
// at samples, or when it is shorter than ten steps.
MadeMotion make(const SyntheticInput& input);

}  // namespace pilotis::pulse
