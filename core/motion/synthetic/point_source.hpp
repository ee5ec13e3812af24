// The Fourier amplitude spectrum of the ground acceleration from a point source of Brune's omega-squared shape.
//
//     A(f) = C M0 S(f) G(R) exp(-pi f R / (Q(f) c_Q)) site(f) D(f) (2 pi f)^2
//     C    = <R_theta_phi> V F / (4 pi rho beta^3 R0),  <R> = 0.55, V = 1/sqrt(2) (printed 0.71), F = 2, R0 = 1 km
//     S(f) = 1 / (1 + (f / f_a)^2),   f_a = 4.9e6 beta (stress drop / M0)^(1/3)   [beta km/s, bar, dyne cm]
//     M0   = 10^(1.5 M + 16.05) dyne cm                                           (Hanks & Kanamori 1979)
//     G(R) = (R0/R)^p1 to R1, then (R1/R)^p2 to R2, then (R2/R)^p3;   Q(f) = Q0 (f / 1 Hz)^n
//     D(f) = exp(-pi kappa f) / sqrt(1 + (f / f_max)^8)
// Source: Boore 2003, Simulation of ground motion using the stochastic method, Pure and Applied Geophysics 160, 635
// (from memory); the shape and corner: Brune 1970, Journal of Geophysical Research 75, 4997. Boore's f_a is Brune's
// (2.34 / 2 pi) (16 / 7)^(1/3) beta (stress drop / M0)^(1/3), rounded to two figures.
#pragma once

#include <array>

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

struct PointSource {
  double magnitude = 0;                    // moment magnitude M
  double stress_drop = 0;                  // Pa
  double distance = 0;                     // R, m, >= R0
  double density = 0;                      // rho, kg/m3
  double shear_velocity = 0;               // beta, m/s
  std::array<double, 3> spreading{};       // p1, p2, p3
  std::array<double, 2> hinge_distance{};  // R1, R2, m, R0 <= R1 <= R2
  double quality = 0;                      // Q0
  double quality_exponent = 0;             // n
  double quality_velocity = 0;             // c_Q, m/s
  double kappa = 0;                        // s
  double f_max = 0;                        // Hz; 0: not used
  Curve site;  // frequency (Hz), amplification; empty: 1. Its end values hold beyond its ends

  double moment() const;                              // M0, N m
  double corner_frequency() const;                    // f_a, Hz
  double source_spectrum(double frequency) const;     // of displacement, C M0 S(f), m s at R0
  double spreading_factor() const;                    // G(R)
  double amplitude_spectrum(double frequency) const;  // A(f), m/s (m/s2 per Hz); `frequency` in Hz, >= 0
};

}  // namespace pilotis
