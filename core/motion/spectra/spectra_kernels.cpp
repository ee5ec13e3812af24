// Compiled once per instruction set.
#include "core/motion/spectra/spectra_kernels.hpp"

#include "core/motion/spectra/bilinear_kernel.hpp"
#include "core/motion/spectra/oscillator_kernel.hpp"

namespace pilotis::PILOTIS_INSTRUCTION_SET {

using P = Pack<PILOTIS_LANES>;

void march_extremes(const double* ground, int steps, OscillatorBundle* bundles, int count) noexcept {
  spectra::march_extremes<P>(ground, steps, bundles, count);
}

void march_displacements(const double* ground, int steps, OscillatorBundle& bundle, double* u) noexcept {
  spectra::march_displacements<P>(ground, steps, bundle, u);
}

void march_bilinear(const double* ground, int steps, double post_yield_ratio, BilinearBundle& bundle) noexcept {
  spectra::march_bilinear<P>(ground, steps, post_yield_ratio, bundle);
}

}  // namespace pilotis::PILOTIS_INSTRUCTION_SET
