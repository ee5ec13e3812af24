// The velocity pulse of the near-fault ground, in closed form.
//
//     v(t) = A/2 (1 + cos(2 pi f_p s / gamma)) cos(2 pi f_p s + nu),   s = t - t0,   |s| <= gamma / (2 f_p)
//
// and at rest outside. A: amplitude, m/s; f_p: prevailing frequency, Hz; gamma > 1: number of half cycles; nu: phase,
// rad.
//     a(t) = -(A pi f_p / gamma) (sin(2 pi f_p s / gamma) cos(2 pi f_p s + nu)
//                                 + gamma sin(2 pi f_p s + nu) (1 + cos(2 pi f_p s / gamma)))
// The ground comes to rest displaced by A / (4 pi f_p (1 - gamma^2)) (sin(nu + pi gamma) - sin(nu - pi gamma)).
// Source: Mavroeidis & Papageorgiou 2003, Bulletin of the Seismological Society of America 93, 1099 (the acceleration
// is the derivative of v, the displacement its integral, checked against v by the tests).
#pragma once

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

struct NearFaultPulse {
  double amplitude = 0;  // A, m/s
  double frequency = 0;  // f_p, Hz, > 0
  double gamma = 0;      // > 1
  double nu = 0;         // rad
  double center = 0;     // t0, s

  double half_length() const { return gamma / (2 * frequency); }  // s
  double acceleration(double time) const;                         // m/s2
  double velocity(double time) const;                             // m/s
  double displacement(double time) const;                         // m, 0 before the pulse
};

namespace near_fault_pulse {

extern const SyntheticKind kind;

// Throws Error (input) when the pulse does not lie within the duration or the step is coarser than a tenth of 1 / f_p.
MadeMotion make(const SyntheticInput& input);

}  // namespace near_fault_pulse

}  // namespace pilotis
