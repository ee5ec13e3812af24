// White noise from the rock, filtered by the ground as one damped oscillator, shaped by an envelope.
//
//     z'' + 2 zeta_g omega_g z' + omega_g^2 z = -w(t),   f(t) = z'' + w = -(2 zeta_g omega_g z' + omega_g^2 z)
//     a(t) = I(t) f(t), then corrected (baseline.hpp), then scaled to the stated peak
//
// w: Gaussian white noise of two-sided spectral density S0 (m2/s3 per rad/s, i.e. (m/s2)^2 per rad/s). The filtered
// acceleration then has the density S0 (1 + 4 zeta_g^2 r^2) / ((1 - r^2)^2 + 4 zeta_g^2 r^2), r = omega / omega_g, and
// the variance pi S0 omega_g (1 + 4 zeta_g^2) / (2 zeta_g).
// Source: Kanai 1957, Bulletin of the Earthquake Research Institute 35, 309; Tajimi 1960, Proc. 2nd World Conf.
// Earthquake Engineering, 781. omega_g is given as the period T_g = 2 pi / omega_g, which no one mistakes for hertz.
//
// The oscillator is marched exactly in distribution, at any step: its state at the next sample is the free vibration of
// its state now plus a normal pair whose covariance is what white noise adds in between. It starts in its stationary
// state. Random numbers: random.hpp. Samples are rounded to 1e-6 m/s2, so that the last bit of a mathematics library
// does not show and a file with six decimals holds the motion exactly.
//
// The model lets long periods through unfiltered (the density at omega = 0 is S0); the baseline correction takes out
// the longest only.
#pragma once

#include <array>
#include <span>
#include <string>
#include <vector>

#include "core/motion/accelerogram.hpp"
#include "core/motion/synthetic/envelope.hpp"
#include "core/motion/synthetic/grid.hpp"
#include "core/parameter.hpp"

namespace pilotis {

struct KanaiTajimi {
  double pga = 0;             // m/s2, > 0: the largest magnitude, to 1e-6 m/s2
  double ground_period = 0;   // T_g, s, > 0
  double ground_damping = 0;  // zeta_g, fraction of critical, > 0 and < 1
  Envelope envelope;

  static const Method method;
  // From numbers in the order of method.parameters.
  static KanaiTajimi make(std::span<const double> values);
};

// The filter's output f(t) for S0 = `density`, without envelope, correction and scale: `count` samples, m/s2.
std::vector<double> filtered_noise(double ground_period, double ground_damping, double density, double step,
                                   std::size_t count, std::uint64_t seed);

// Throws Error (input) at `where` when the envelope's times do not go together, or the step is coarser than a tenth of
// the ground period or than the duration allows.
Accelerogram made(const KanaiTajimi& motion, const SyntheticGrid& grid, const std::string& where);

}  // namespace pilotis
