// The rival of the lanes: SUNDIALS CVODE as anyone would set it up for one run (BDF, banded Newton), measured in the
// same run of the bench.
#pragma once

#include <vector>

#include "core/building/stick.hpp"
#include "core/motion/accelerogram.hpp"

namespace pilotis::bench {

// Peak drifts, m, [story], of a bilinear stick with RayleighByFactors damping, seen every 0.005 s up to `end` (s).
// Unknowns per story: u, v, slip; the slip follows the drift while the slider is at its strength and pushed further.
std::vector<double> cvode_stiff_peaks(const Stick& stick, const Accelerogram& record, double factor, double end,
                                      double rtol);

}  // namespace pilotis::bench
