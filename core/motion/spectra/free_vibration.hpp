// Free vibration in closed form: q'' + 2 zeta omega q' + omega^2 q = 0 from q0, q0' on.
//   q = exp(-zeta omega t) (q0 cos(omega_d t) + (q0' + zeta omega q0) / omega_d sin(omega_d t))
// Its extremes lie half a damped period apart, each smaller than the last: the first two hold all that can still come,
// one on each side. u, v and the absolute acceleration after the record's end all obey this equation.
// Source: any text on vibrations, e.g. Clough & Penzien, "Dynamics of Structures", free-vibration response (from
// memory).
#pragma once

#include "core/motion/spectra/oscillator.hpp"

namespace pilotis {

struct Swing {
  double first, second;  // the first two extremes for t > 0, of opposite sign; 0, 0 when at rest
  double first_at;       // s, when the first is
};

// q0 in any unit, rate = q0' in that unit per second. period > 0.
Swing free_vibration(const Oscillator& oscillator, double q0, double rate);

}  // namespace pilotis
