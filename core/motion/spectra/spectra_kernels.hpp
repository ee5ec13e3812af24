// The entries of the kernels of this folder, one of each per instruction set (core/lanes/kernels.cmake).
#pragma once

#include "core/lanes/instruction_set.hpp"

namespace pilotis {

struct OscillatorBundle;

// oscillator_kernel.hpp says what each does.
PILOTIS_DECLARE_KERNELS(void march_extremes(const double* ground, int steps, OscillatorBundle* bundles,
                                            int count) noexcept;
                        void march_displacements(const double* ground, int steps, OscillatorBundle& bundle,
                                                 double* u) noexcept)

}  // namespace pilotis
