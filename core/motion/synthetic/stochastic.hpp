// The stochastic method: windowed noise given the spectrum of a point source (point_source.hpp).
//
// Normal noise times a Saragoni-Hart window (envelope.hpp; epsilon = 0.2, eta = 0.05, t_eta = 2 T_gm) is transformed,
// divided by the root of its mean square amplitude, multiplied by A(f) and transformed back. Duration of motion
//     T_gm = source_duration / f_a + path_duration R
// The window starts after `lead`, because the filter, which shifts no phase, also spreads a little to earlier times.
// Source: Boore 2003, Pure and Applied Geophysics 160, 635, section on time-domain simulation (from memory).
// Then the ground is brought to rest (baseline.hpp), which changes frequencies of about one over the duration only.
// The mean square of the Fourier amplitudes over many seeds is A(f)^2; one motion scatters about it.
#pragma once

#include <cstdint>
#include <vector>

#include "core/motion/synthetic/point_source.hpp"

namespace pilotis {

// `window` times normal noise, given the amplitude spectrum of `source`: as many samples as `window` has, m/s2. The
// window should be followed by zeros as long as itself, because a Fourier transform takes it to repeat.
std::vector<double> shaped_noise(const PointSource& source, const std::vector<double>& window, double step,
                                 std::uint64_t seed);

namespace stochastic {

extern const SyntheticKind kind;

// Throws Error (input) when the hinge distances fall, or the duration does not hold lead and window.
MadeMotion make(const SyntheticInput& input);

}  // namespace stochastic

}  // namespace pilotis
