// Gaussian noise that is white up to the Nyquist frequency, shaped by an envelope.
//
// Samples are independent, of variance 2 pi S0 / dt, S0 the two-sided density (m2/s3 per rad/s). Taken linear between
// samples, as everywhere here, the acceleration has the density S0 (sin(x) / x)^4, x = omega dt / 2: within 1 % of S0
// up to omega dt = 0.24.
#pragma once

#include "core/motion/synthetic/kind.hpp"

namespace pilotis::white_noise {

extern const SyntheticKind kind;

// Throws Error (input) when the envelope's times do not go together or not exactly one intensity is asked for.
MadeMotion make(const SyntheticInput& input);

}  // namespace pilotis::white_noise
