// resample: the record at another time step.
//
// band_limited: the trigonometric polynomial through the samples (followed by as many zeros as there are samples) is
// evaluated at the new times, by Fourier transform. A coarser step loses all at and above the new Nyquist frequency
// (sharp cut, so nothing is aliased), and the share of the energy lost is said; a finer step loses nothing. A record
// that does not come from and go to zero rings at its ends: taper it first. Old and new step must be to each other as
// two whole numbers up to 1000. (Shannon 1949, Proceedings of the IRE 37, 10.) linear: straight between samples, as the
// motion is marched; a finer step that divides the old one changes nothing. A coarser step aliases, which is said.
//
// The new samples start at t = 0 (with 0 where the record's first sample was at one step) and end at or before the last
// old sample.
#pragma once

#include "core/motion/processing/step.hpp"

namespace pilotis {

struct Resample {
  enum class Manner { band_limited, linear };
  double step = 0;  // s, > 0
  Manner manner = Manner::band_limited;

  static const Method method;
  static Resample make(std::span<const double> values);
  Processed applied(const Accelerogram& record) const;
};

}  // namespace pilotis
