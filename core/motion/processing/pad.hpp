// pad: zeros before and after the record, room for what a filter spreads out in time.
//
// Given as times, or by the rule for acausal Butterworth filters of low corner f_c and order n: 1.5 n / f_c, here at
// each end. Source: Converse & Brady 1992, BAP, U.S. Geological Survey Open-File Report 92-296A; Boore 2005, Bulletin
// of the Seismological Society of America 95, 745 (both from memory; where they mean both ends together, this is twice
// what they ask). Lengths are rounded up to whole steps. The record starts later by the zeros before it.
#pragma once

#include "core/motion/processing/step.hpp"

namespace pilotis {

// s: 1.5 order / corner (Hz).
double filter_pad_length(int order, double corner);

struct ZeroPad {
  double before = 0, after = 0;  // s
  double corner = 0;             // Hz, instead of both: of the filter to come
  int order = 4;                 // of the filter to come, with `corner`

  static const Method method;
  static ZeroPad make(std::span<const double> values);  // throws unless either times or a corner are given
  Processed applied(const Accelerogram& record) const;
};

}  // namespace pilotis
