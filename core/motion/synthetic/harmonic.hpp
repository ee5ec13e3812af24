// Harmonic acceleration, with a ramp at both ends if wanted.
//
//     a(t) = r(t) A sin(2 pi f t + phi)     r: rises linearly from 0 within the ramp, falls so at the end of the
//     duration
//
// No baseline correction: the velocity of a sine that starts at once has a mean, and the displacement drifts.
#pragma once

#include "core/motion/synthetic/kind.hpp"

namespace pilotis::harmonic {

extern const SyntheticKind kind;

// Throws Error (input) when the two ramps do not fit into the duration or the step is coarser than a tenth of 1 / f.
MadeMotion make(const SyntheticInput& input);

}  // namespace pilotis::harmonic
