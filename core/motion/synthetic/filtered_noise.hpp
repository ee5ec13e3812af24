// Gaussian white noise through a linear filter, marched exactly in distribution at any step.
//
//     x' = A x + b w(t),   f(t) = c . x       w: two-sided spectral density S0, m2/s3 per rad/s ((m/s2)^2 per rad/s)
//
// The state at the next sample is Phi = exp(A dt) times the state now plus a normal vector of covariance P - Phi P
// Phi^T, which is what the noise adds in between; P is the stationary covariance, A P + P A^T + 2 pi S0 b b^T = 0. The
// first state is drawn from P, so that the motion is stationary from its first sample.
//
// Random numbers: random.hpp. The mathematics library (exp, cos, sin, log) may differ in the last bit between machines;
// made motions are rounded to 1e-6 m/s2, which hides that except where a value falls on the edge of rounding.
#pragma once

#include <Eigen/Core>
#include <cstdint>
#include <vector>

namespace pilotis {

template <int N>
struct NoiseFilter {
  using Matrix = Eigen::Matrix<double, N, N>;
  using Vector = Eigen::Matrix<double, N, 1>;
  Matrix transition;  // Phi
  Matrix stationary;  // P
  Vector output;      // c
};

// The filters of kanai_tajimi.hpp and clough_penzien.hpp. Frequencies in rad/s, > 0; damping in (0, 1); step in s.
NoiseFilter<2> kanai_tajimi_filter(double omega_g, double zeta_g, double density, double step);
NoiseFilter<4> clough_penzien_filter(double omega_g, double zeta_g, double omega_f, double zeta_f, double density,
                                     double step);

// `count` samples of f, m/s2. For N = 2 and 4.
template <int N>
std::vector<double> filtered_noise(const NoiseFilter<N>& filter, std::size_t count, std::uint64_t seed);

// Noise that is white up to the Nyquist frequency: independent normal samples of variance 2 pi S0 / dt, m/s2.
std::vector<double> sampled_white_noise(double density, double step, std::size_t count, std::uint64_t seed);

}  // namespace pilotis
