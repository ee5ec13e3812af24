// Kanai-Tajimi noise (kanai_tajimi.hpp) through a second filter that takes out the long periods, shaped by an envelope.
//
//     y'' + 2 zeta_f omega_f y' + omega_f^2 y = -f_g(t),   f(t) = y''
//
// f_g: the Kanai-Tajimi acceleration. Density: Kanai-Tajimi's times r^4 / ((1 - r^2)^2 + 4 zeta_f^2 r^2),
// r = omega / omega_f. Source: Clough & Penzien, Dynamics of Structures (1975), chapter on stochastic ground motion,
// from memory. The filter is given as its period 2 pi / omega_f.
#pragma once

#include "core/motion/synthetic/kind.hpp"

namespace pilotis::clough_penzien {

extern const SyntheticKind kind;

// Throws Error (input) as kanai_tajimi::make does, and when the filter's period is not longer than the ground's.
MadeMotion make(const SyntheticInput& input);

}  // namespace pilotis::clough_penzien
