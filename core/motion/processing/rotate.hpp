// Two horizontal components in other directions of the same plane. Takes two records, so it is no step of the registry.
//
//     first'  =  cos(angle) first + sin(angle) second
//     second' = -sin(angle) first + cos(angle) second
//
// first' is the motion along the axis that lies `angle` from the first component towards the second.
#pragma once

#include <string>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

struct RotatedPair {
  Accelerogram first, second;
  std::string done;  // one line that says what was done
};

// angle in rad. Throws Error (input) at `where` unless both have the same step, first time and number of samples.
RotatedPair rotated(const Accelerogram& first, const Accelerogram& second, double angle, const std::string& where);

}  // namespace pilotis
