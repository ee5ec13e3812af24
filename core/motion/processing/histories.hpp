// Ground velocity and displacement from an accelerogram, at rest before t = 0.
//
// The acceleration is linear between samples (core/motion/accelerogram.hpp), so that velocity is a parabola and
// displacement a cubic in each step; both are integrated exactly (for velocity that is the trapezoidal rule). Nothing
// is corrected here.
#pragma once

#include <vector>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// The motion from rest to rest: values at t = 0, step, 2 step, ... with the zero at t = 0 where the first sample is at
// one step, and the zero one step after the last sample. m/s2.
std::vector<double> acceleration_history(const Accelerogram& record);

std::vector<double> velocity_history(const Accelerogram& record);      // m/s, at the same times
std::vector<double> displacement_history(const Accelerogram& record);  // m, at the same times

}  // namespace pilotis
