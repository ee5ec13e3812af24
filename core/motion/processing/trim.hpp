// trim: keeps the part of the record in which its Arias intensity grows from one share to another (5 % to 95 %, say),
// with some time before and after it.
//
// The first kept sample is at or before, the last at or after the times asked for, as far as the record goes. The
// motion then starts with what the first kept sample is: taper it where it should start from nothing.
#pragma once

#include "core/motion/processing/step.hpp"

namespace pilotis {

struct TrimToArias {
  double from = 0.05, to = 0.95;  // shares of the final Arias intensity, 0 to 1, from < to
  double lead = 0, trail = 0;     // s, kept before and after

  static const Method method;
  static TrimToArias make(std::span<const double> values);
  Processed applied(const Accelerogram& record) const;  // throws for a record of zeros
};

}  // namespace pilotis
