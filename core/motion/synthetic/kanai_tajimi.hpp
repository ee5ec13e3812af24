// White noise from the rock, filtered by the ground as one damped oscillator, shaped by an envelope.
//
//     z'' + 2 zeta_g omega_g z' + omega_g^2 z = -w(t),   f(t) = z'' + w = -(2 zeta_g omega_g z' + omega_g^2 z)
//
// w: Gaussian white noise of two-sided spectral density S0 (m2/s3 per rad/s, i.e. (m/s2)^2 per rad/s). The filtered
// acceleration then has the density S0 (1 + 4 zeta_g^2 r^2) / ((1 - r^2)^2 + 4 zeta_g^2 r^2), r = omega / omega_g, and
// the variance pi S0 omega_g (1 + 4 zeta_g^2) / (2 zeta_g).
// Source: Kanai 1957, Bulletin of the Earthquake Research Institute 35, 309; Tajimi 1960, Proc. 2nd World Conf.
// Earthquake Engineering, 781. omega_g is given as the period T_g = 2 pi / omega_g, which no one mistakes for hertz.
//
// The model lets long periods through unfiltered (the density at omega = 0 is S0); the baseline correction takes out
// the longest only. clough_penzien.hpp filters them.
#pragma once

#include "core/motion/synthetic/kind.hpp"
#include "core/motion/synthetic/parameters.hpp"

namespace pilotis::kanai_tajimi {

// Ground of 0.4 s (omega_g = 15.7 rad/s) damped by 0.6: Kanai's firm ground, from memory.
inline constexpr std::array<Parameter, 2> ground_parameters{
    positive("ground_period", Dimension::time, "period of the ground, 2 pi / omega_g", 0.4),
    damping_ratio("ground_damping", "damping ratio of the ground, zeta_g", 0.6)};

extern const SyntheticKind kind;

// Throws Error (input) when the envelope's times do not go together, when not exactly one intensity is asked for, or
// when the step is coarser than a tenth of the ground period.
MadeMotion make(const SyntheticInput& input);

}  // namespace pilotis::kanai_tajimi
