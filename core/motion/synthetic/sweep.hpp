// A sine whose frequency goes from f1 to f2 over the duration T, linearly or logarithmically.
//
//     a(t) = r(t) A sin(phi(t)),   phi' = 2 pi f(t)
//     linear:       f = f1 + (f2 - f1) t / T,    phi = 2 pi (f1 t + (f2 - f1) t^2 / (2 T))
//     logarithmic:  f = f1 (f2 / f1)^(t / T),    phi = 2 pi f1 T / ln(f2 / f1) ((f2 / f1)^(t / T) - 1)
//
// r: the ramp of harmonic.hpp. f1 may be above f2; equal frequencies make a harmonic motion.
#pragma once

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

// phi(t), rad.
double linear_sweep_phase(double time, double from, double to, double duration);
double logarithmic_sweep_phase(double time, double from, double to, double duration);

namespace sweep {

extern const SyntheticKind kind;

// Throws Error (input) when the ramps do not fit into the duration or the step is coarser than a tenth of the shortest
// period.
MadeMotion make(const SyntheticInput& input);

}  // namespace sweep

}  // namespace pilotis
