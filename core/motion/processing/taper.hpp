// taper: brings the ends of the record to zero with half a cosine wave.
//
//     w(t) = (1 - cos(pi t / t_start)) / 2   over the first t_start after the first sample; alike before the last
//
// The window of Tukey 1967 where both ends are equal: an introduction to the calculations of numerical spectrum
// analysis (from memory). The samples between are not changed.
#pragma once

#include "core/motion/processing/step.hpp"

namespace pilotis {

struct CosineTaper {
  double start = 0, end = 0;  // s, length of the taper at the start and the end; 0: none
  double fraction = 0;        // instead of both: of the time from first to last sample, at each end; at most 0.5

  static const Method method;
  static CosineTaper make(std::span<const double> values);  // throws unless either times or a fraction are given
  Processed applied(const Accelerogram& record) const;      // throws when the two tapers are longer than the record
};

}  // namespace pilotis
