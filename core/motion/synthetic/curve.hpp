// Tables of pairs: checking and reading between their points.
#pragma once

#include <string>

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

// Throws Error (input) at `where` when a curve is not as kind.hpp describes it, or a required one is empty.
void require_allowed(const CurveParameter& parameter, const Curve& curve, const std::string& where);

// y at x > 0, taken straight between the logarithms of the points; the end values beyond the ends.
double log_log(const Curve& curve, double x);

}  // namespace pilotis
