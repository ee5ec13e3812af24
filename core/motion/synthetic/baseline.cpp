#include "core/motion/synthetic/baseline.hpp"

#include <fmt/format.h>

#include <Eigen/Dense>
#include <algorithm>
#include <array>
#include <cmath>

namespace pilotis {

namespace {

constexpr int terms = 4;  // of the polynomial

// The acceleration at sample i, 0 after the last.
double sample(const std::vector<double>& a, std::size_t i) { return i < a.size() ? a[i] : 0; }

std::vector<double> term(const std::vector<double>& envelope, int power) {
  std::vector<double> shape(envelope.size());
  const double scale = 2.0 / static_cast<double>(envelope.size() - 1);
  for (std::size_t i = 0; i < shape.size(); ++i)
    shape[i] = envelope[i] * std::pow(scale * static_cast<double>(i) - 1, power);
  return shape;
}

double product(const std::vector<double>& a, const std::vector<double>& b) {
  double sum = 0;
  for (std::size_t i = 0; i < a.size(); ++i) sum += a[i] * b[i];
  return sum;
}

using Matrix = Eigen::Matrix<double, terms + 2, terms + 2>;
using Vector = Eigen::Matrix<double, terms + 2, 1>;

// Least squares with two conditions, by multipliers. All in units of one step, so that the rows are alike in size.
Vector solved(const std::vector<double>& acceleration, const std::array<std::vector<double>, terms>& shapes) {
  const std::vector<double> velocity = ground_velocity(acceleration, 1);
  const double length = static_cast<double>(velocity.size());
  Matrix matrix = Matrix::Zero();
  Vector right = Vector::Zero();
  std::array<std::vector<double>, terms> velocities;
  for (int i = 0; i < terms; ++i) velocities[i] = ground_velocity(shapes[i], 1);
  for (int i = 0; i < terms; ++i) {
    for (int j = 0; j < terms; ++j) matrix(i, j) = product(velocities[i], velocities[j]) / (length * length * length);
    right(i) = product(velocities[i], velocity) / (length * length * length);
    matrix(i, terms) = matrix(terms, i) = velocities[i].back() / length;
    matrix(i, terms + 1) = matrix(terms + 1, i) = ground_displacement(shapes[i], 1).back() / (length * length);
  }
  right(terms) = velocity.back() / length;
  right(terms + 1) = ground_displacement(acceleration, 1).back() / (length * length);
  return matrix.fullPivLu().solve(right);
}

}  // namespace

std::vector<double> ground_velocity(const std::vector<double>& acceleration, double step) {
  std::vector<double> velocity(acceleration.size() + 1, 0.0);
  for (std::size_t i = 1; i < velocity.size(); ++i)
    velocity[i] = velocity[i - 1] + step * (acceleration[i - 1] + sample(acceleration, i)) / 2;
  return velocity;
}

std::vector<double> ground_displacement(const std::vector<double>& acceleration, double step) {
  const std::vector<double> velocity = ground_velocity(acceleration, step);
  std::vector<double> displacement(velocity.size(), 0.0);
  for (std::size_t i = 1; i < displacement.size(); ++i)
    displacement[i] = displacement[i - 1] + step * velocity[i - 1] +
                      step * step * (2 * acceleration[i - 1] + sample(acceleration, i)) / 6;
  return displacement;
}

std::string correct_baseline(std::vector<double>& acceleration, const std::vector<double>& envelope) {
  std::array<std::vector<double>, terms> shapes;
  for (int power = 0; power < terms; ++power) shapes[power] = term(envelope, power);
  const Vector numbers = solved(acceleration, shapes);
  double largest = 0, peak = 0;
  for (std::size_t i = 0; i < acceleration.size(); ++i) {
    double taken = 0;
    for (int power = 0; power < terms; ++power) taken += numbers(power) * shapes[power][i];
    largest = std::max(largest, std::abs(taken));
    acceleration[i] -= taken;
    peak = std::max(peak, std::abs(acceleration[i]));
  }
  return fmt::format("brought to rest: cubic times envelope taken out, at most {:.2g} % of the peak acceleration",
                     100 * largest / peak);
}

}  // namespace pilotis
