// The exact step of an oscillator under ground acceleration linear over the step:
//   u1 = a_uu u0 + a_uv v0 + b_u0 p0 + b_u1 p1,   v1 = a_vu u0 + a_vv v0 + b_v0 p0 + b_v1 p1
// with p the ground acceleration. Source: Nigam & Jennings, "Calculation of response spectra from strong-motion
// earthquake records", Bull. Seism. Soc. Am. 59 (1969) 909.
//
// Their closed forms lose digits as 1 / (omega h)^3 for long periods. Here the same numbers come from Taylor series,
// which lose none. With g the response to a unit impulse, G its integral and GG the integral of that, all at h:
//   a_uu = 1 - omega^2 G, a_uv = g, a_vu = -omega^2 g, a_vv = g'
//   b_u0 = -(G - GG/h), b_u1 = -GG/h, b_v0 = -(g - G/h), b_v1 = -G/h
#pragma once

#include "core/motion/spectra/oscillator.hpp"

namespace pilotis {

struct Recurrence {
  double a_uu, a_uv, a_vu, a_vv;  // -, s, 1/s, -
  double b_u0, b_u1;              // s2
  double b_v0, b_v1;              // s
  double omega;                   // rad/s
};

// period > 0; step > 0 (s), at most a tenth of the period: the series are cut off for that.
Recurrence recurrence(const Oscillator& oscillator, double step);

}  // namespace pilotis
