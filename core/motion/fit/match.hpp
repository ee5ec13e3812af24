// Matches an accelerogram to target spectra by adding wavelets in the time domain.
//
// Each matched oscillator j has one wavelet, placed where its response peaks (time t_j):
//     w_j(t) = cos(omega' s) exp(-(s / gamma)^2),   s = t - t_j + shift,   omega' = omega sqrt(1 - zeta^2),
//     shift = atan(sqrt(1 - zeta^2) / zeta) / omega',   gamma = 1.178 s (f / 1 Hz)^-0.93
// the improved tapered cosine of Al Atik & Abrahamson 2010, Earthquake Spectra 26, 601 (from memory). It integrates to
// almost no velocity and displacement; the rest, and what is cut off at the ends of the record, is taken out by
// (c0 + c1 s / gamma) exp(-(s / gamma)^2), so that velocity and displacement after the last sample are those of the
// record given, to rounding.
// The amplitudes b solve sum_j c_ij b_j = target_i - |R_i| with the sign of R_i, c_ij the response of oscillator i at
// t_i to w_j, off-diagonal terms times 0.7; this is iterated (Lilhanand & Tseng 1987; Hancock et al. 2006, Journal of
// Earthquake Engineering 10, special issue 1, 67; from memory).
//
// The record should first be scaled to the target's level. Between matched periods the spectrum is free: take at least
// twenty per decade.
#pragma once

#include <span>
#include <string>
#include <vector>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// The pseudo-acceleration (m/s2, > 0) wanted at each period (s, > 0, rising) for one damping ratio, in (0, 1).
struct MatchTarget {
  double damping = 0.05;
  std::vector<double> periods;
  std::vector<double> pseudo_accelerations;
};

struct MatchSettings {
  double tolerance = 0.05;  // largest deviation at a matched period, as a share of the target, > 0
  int iterations = 30;      // >= 1
};

struct Match {
  Accelerogram record;
  bool within_tolerance = false;
  double deviation = 0;  // largest at a matched period, as a share of the target
  int iterations = 0;    // done
};

// The best of all iterations; spectra are those of core/motion/spectra with their usual step rule. Throws Error (input)
// at `where` when the record or a target is not as described, or a period is shorter than two steps or longer than the
// record.
Match matched(const Accelerogram& record, std::span<const MatchTarget> targets, const MatchSettings& settings,
              const std::string& where);

// w_j, with its velocity and displacement taken to zero, on the grid of `record`; `peak` is t_j, s.
std::vector<double> match_wavelet(const Accelerogram& record, double period, double damping, double peak);

}  // namespace pilotis
