// A motion whose response spectrum follows a target: a sum of sinusoids with random phases, its amplitudes iterated.
//
//     a(t) = I(t) sum_k A_k cos(omega_k t + phi_k),   omega_k = 2 pi k / (N dt) within the target's periods,
//     A_k = sqrt(2 G(omega_k) d_omega),   phi_k uniform
//
// The first density G is that whose stationary response has the target as its median peak (Vanmarcke):
//     G(w) = ((S_a(w) / r)^2 - integral_0^w G) / (w (pi / (4 zeta_s) - 1)),   zeta_s = zeta / (1 - exp(-2 zeta w s))
//     r^2 = 2 ln(2 n (1 - exp(-delta^1.2 sqrt(pi ln 2n)))),  n = w s / (2 pi ln 2),  delta = sqrt(4 zeta_s / pi)
// s: duration of the strong part, the integral of I^2. Then, until the spectrum is within the tolerance at every period
// of target_grid (100 over the target's range): the ground is brought to rest (baseline.hpp), its
// spectrum S computed, and G multiplied by (S_target / S)^2. With some phases the iteration stalls at a long period,
// where few sinusoids count; then the next set of phases is drawn from the same stream of random numbers. Within 15 %
// is usual; a closer fit is the business of matching by wavelets. Source: Gasparini & Vanmarcke 1976, Simulated
// earthquake motions compatible with prescribed response spectra, MIT R76-4; Vanmarcke 1976 (both from memory). Between
// its points the target is taken straight in logarithms.
#pragma once

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

// One-sided density of acceleration at each frequency (rad/s, rising, evenly spaced), m2/s3. `duration`: s above, s.
std::vector<double> density_of_target(const Curve& target, double damping, double duration,
                                      const std::vector<double>& frequencies);

// The periods (s) at which the spectrum is held to the target: 100 in equal ratios.
std::vector<double> target_grid(double shortest, double longest);

namespace spectrum_compatible {

extern const SyntheticKind kind;

// Throws Error (input) when the step is coarser than a fifth of the target's shortest period, the duration shorter than
// its longest, or the tolerance is not reached within the draws and iterations.
MadeMotion make(const SyntheticInput& input);

}  // namespace spectrum_compatible

}  // namespace pilotis
