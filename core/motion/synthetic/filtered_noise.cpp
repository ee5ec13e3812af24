#include "core/motion/synthetic/filtered_noise.hpp"

#include <Eigen/Dense>
#include <cmath>
#include <numbers>
#include <unsupported/Eigen/MatrixFunctions>

#include "core/motion/synthetic/random.hpp"

namespace pilotis {

namespace {

using std::numbers::pi;
using Matrix2 = Eigen::Matrix2d;
using Vector2 = Eigen::Vector2d;
using Matrix4 = Eigen::Matrix4d;
using Vector4 = Eigen::Vector4d;

// State (z, z') of the free damped oscillator one step later.
Matrix2 free_vibration(double omega, double zeta, double step) {
  const double damped = omega * std::sqrt(1 - zeta * zeta);
  const double decay = std::exp(-zeta * omega * step);
  const double c = std::cos(damped * step), s = std::sin(damped * step);
  const double ratio = zeta * omega / damped;
  Matrix2 phi;
  phi << decay * (c + ratio * s), decay * s / damped, -decay * omega * omega * s / damped, decay * (c - ratio * s);
  return phi;
}

// Stationary covariance of (z, z') under white noise (Crandall & Mark 1963): pi S0 / (2 zeta omega^3), pi S0 / (2 zeta
// omega), uncorrelated.
Matrix2 stationary_covariance(double omega, double zeta, double density) {
  const double velocity = pi * density / (2 * zeta * omega);
  return Vector2(velocity / (omega * omega), velocity).asDiagonal();
}

// P of A P + P A^T + Q = 0, as sixteen linear equations.
Matrix4 lyapunov(const Matrix4& a, const Matrix4& q) {
  Eigen::Matrix<double, 16, 16> equations = Eigen::Matrix<double, 16, 16>::Zero();
  Eigen::Matrix<double, 16, 1> right;
  for (int i = 0; i < 4; ++i)
    for (int j = 0; j < 4; ++j) {
      right(4 * i + j) = -q(i, j);
      for (int k = 0; k < 4; ++k) {
        equations(4 * i + j, 4 * k + j) += a(i, k);
        equations(4 * i + j, 4 * i + k) += a(j, k);
      }
    }
  const Eigen::Matrix<double, 16, 1> solution = equations.fullPivLu().solve(right);
  Matrix4 p;
  for (int i = 0; i < 4; ++i)
    for (int j = 0; j < 4; ++j) p(i, j) = (solution(4 * i + j) + solution(4 * j + i)) / 2;
  return p;
}

}  // namespace

NoiseFilter<2> kanai_tajimi_filter(double omega_g, double zeta_g, double density, double step) {
  return {free_vibration(omega_g, zeta_g, step), stationary_covariance(omega_g, zeta_g, density),
          -Vector2(omega_g * omega_g, 2 * zeta_g * omega_g)};
}

// State (z, z', y, y'):  z'' = -2 zeta_g omega_g z' - omega_g^2 z - w,  y'' = -2 zeta_f omega_f y' - omega_f^2 y - f_g,
// f_g = -(2 zeta_g omega_g z' + omega_g^2 z); the output is y''.
NoiseFilter<4> clough_penzien_filter(double omega_g, double zeta_g, double omega_f, double zeta_f, double density,
                                     double step) {
  const double kg = omega_g * omega_g, cg = 2 * zeta_g * omega_g;
  const double kf = omega_f * omega_f, cf = 2 * zeta_f * omega_f;
  Matrix4 a;
  a << 0, 1, 0, 0, -kg, -cg, 0, 0, 0, 0, 0, 1, kg, cg, -kf, -cf;
  Matrix4 q = Matrix4::Zero();
  q(1, 1) = 2 * pi * density;
  const Matrix4 scaled = a * step;
  return {scaled.exp(), lyapunov(a, q), Vector4(kg, cg, -kf, -cf)};
}

template <int N>
std::vector<double> filtered_noise(const NoiseFilter<N>& filter, std::size_t count, std::uint64_t seed) {
  using Vector = typename NoiseFilter<N>::Vector;
  using Matrix = typename NoiseFilter<N>::Matrix;
  const Matrix added = filter.stationary - filter.transition * filter.stationary * filter.transition.transpose();
  const Matrix root = added.llt().matrixL();
  const Matrix first = filter.stationary.llt().matrixL();
  NormalNumbers normal(seed);
  const auto drawn = [&normal] {
    Vector numbers;
    for (int i = 0; i < N; ++i) numbers[i] = normal.next();
    return numbers;
  };
  Vector state = first * drawn();
  std::vector<double> output(count);
  for (double& acceleration : output) {
    acceleration = filter.output.dot(state);
    state = filter.transition * state + root * drawn();
  }
  return output;
}

template std::vector<double> filtered_noise<2>(const NoiseFilter<2>&, std::size_t, std::uint64_t);
template std::vector<double> filtered_noise<4>(const NoiseFilter<4>&, std::size_t, std::uint64_t);

std::vector<double> sampled_white_noise(double density, double step, std::size_t count, std::uint64_t seed) {
  const double deviation = std::sqrt(2 * pi * density / step);
  NormalNumbers normal(seed);
  std::vector<double> output(count);
  for (double& acceleration : output) acceleration = deviation * normal.next();
  return output;
}

}  // namespace pilotis
