// Peak drifts of a bilinear stick by SUNDIALS CVODE: an outside solver on equations written down apart from ours.
#pragma once

#include <vector>

#include "core/building/stick.hpp"
#include "core/motion/accelerogram.hpp"

namespace pilotis::test {

// m, [story]; `stick` has bilinear springs and RayleighByFactors damping, no dashpots, no P-Delta. Marched to `end`
// (s).
//
// Adams methods with relative tolerance 1e-9. The springs' slips are not smooth, so CVODE marches from event to event:
// it stops at every sample of the record (kinks of the load) and finds, by its root search, where a spring reaches its
// yield force and where a drift turns round (a slipping spring sticks again; every drift peak lies there too). Between
// events the equations are linear with constant coefficients, and the tolerance means what it says.
std::vector<double> cvode_peak_drifts(const Stick& stick, const Accelerogram& record, double factor, double end);

}  // namespace pilotis::test
