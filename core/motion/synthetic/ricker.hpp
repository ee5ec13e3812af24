// The Ricker wavelet as acceleration.
//
//     a(t) = A (1 - 2 x^2) exp(-x^2),   x = pi f (t - t0)
//     v(t) = A (t - t0) exp(-x^2),      d(t) = -A / (2 pi^2 f^2) exp(-x^2)
//
// f: the frequency at which its Fourier spectrum is largest, Hz. Velocity and displacement die away by themselves.
// Source: Ricker 1953, Geophysics 18, 10.
#pragma once

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

struct Ricker {
  double amplitude = 0;  // A, m/s2
  double frequency = 0;  // f, Hz, > 0
  double center = 0;     // t0, s

  double acceleration(double time) const;  // m/s2
  double velocity(double time) const;      // m/s
  double displacement(double time) const;  // m
};

namespace ricker {

extern const SyntheticKind kind;

// Throws Error (input) when t0 is not at least 1.5 / f from both ends (there a is 1e-8 A), or the step is coarser than
// a tenth of 1 / f.
MadeMotion make(const SyntheticInput& input);

}  // namespace ricker

}  // namespace pilotis
