// The entries of the kernels of this folder, one of each per instruction set (core/lanes/kernels.cmake).
#pragma once

#include "core/lanes/instruction_set.hpp"

namespace pilotis {

struct OscillatorBundle;
struct BilinearBundle;

// oscillator_kernel.hpp and bilinear_kernel.hpp say what each does.
PILOTIS_DECLARE_KERNELS(
    void march_extremes(const double* ground, int steps, OscillatorBundle* bundles, int count) noexcept;
    void march_displacements(const double* ground, int steps, OscillatorBundle& bundle, double* u) noexcept;
    void march_bilinear(const double* ground, int steps, double post_yield_ratio, BilinearBundle& bundle) noexcept)

}  // namespace pilotis
