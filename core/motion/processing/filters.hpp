// bandpass, highpass, lowpass: Butterworth filters (butterworth.hpp).
//
// acausal: a pass forward and one backward. No phase shift; each pass has the stated order and corners, so that the
// two together have the gain |H|^2: 1/2 (-6 dB) at a corner and a slope of twice the order. The filter's answer spreads
// to both sides, and must find quiet to spread into: pad the record first (pad.hpp). It is said where there is too
// little. causal: one pass, gain 1/sqrt(2) (-3 dB) at a corner, phase shifted.
#pragma once

#include "core/motion/processing/step.hpp"

namespace pilotis {

struct Bandpass {
  double low = 0, high = 0;  // Hz, corners; 0 < low < high < Nyquist frequency of the record
  int order = 4;             // of each pass, at either side; 1 to 10
  Pass pass = Pass::acausal;

  static const Method method;
  static Bandpass make(std::span<const double> values);
  Processed applied(const Accelerogram& record) const;
};

struct Highpass {
  double corner = 0;  // Hz, below the Nyquist frequency of the record
  int order = 4;
  Pass pass = Pass::acausal;

  static const Method method;
  static Highpass make(std::span<const double> values);
  Processed applied(const Accelerogram& record) const;
};

struct Lowpass {
  double corner = 0;  // Hz, below the Nyquist frequency of the record
  int order = 4;
  Pass pass = Pass::acausal;

  static const Method method;
  static Lowpass make(std::span<const double> values);
  Processed applied(const Accelerogram& record) const;
};

}  // namespace pilotis
