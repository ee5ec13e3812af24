// How strong a random motion is to be, asked for in exactly one of three ways.
//
//     pga              largest magnitude of the acceleration, m/s2, by scaling the finished motion
//     arias            Arias intensity pi / (2 g) integral of a^2 dt, m/s, by scaling (Arias 1970, in Seismic Design
//     for
//                      Nuclear Power Plants, MIT Press, 438); exact for the piecewise linear acceleration
//     noise_density    two-sided spectral density S0 of the white noise, m2/s3 per rad/s; nothing is scaled
#pragma once

#include "core/motion/synthetic/kind.hpp"
#include "core/motion/synthetic/parameters.hpp"

namespace pilotis {

inline constexpr std::array<Parameter, 3> intensity_parameters{
    not_negative("pga", Dimension::acceleration, "peak ground acceleration to scale to (0: not asked for)", 0),
    not_negative("arias", Dimension::velocity, "Arias intensity to scale to (0: not asked for)", 0),
    not_negative("noise_density", Dimension::spectral_density,
                 "two-sided density S0 of the white noise per rad/s (0: not asked for)", 0)};

// Throws Error (input) unless exactly one of the three is greater than 0.
void require_one_intensity(const SyntheticInput& input);

// S0 to draw the noise with: the one asked for, 1 when the motion is scaled afterwards. m2/s3.
double noise_density_of(const SyntheticInput& input);

// Scales a finished motion to the pga or Arias intensity asked for; leaves it alone otherwise.
void scale_to_intensity(Accelerogram& record, const SyntheticInput& input);

// Of the piecewise linear acceleration, its fall to zero after the last sample included. m/s.
double arias_intensity_of(const Accelerogram& record);

}  // namespace pilotis
