#include "core/motion/measures/spectral.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr double shortest = 0.1, longest = 2.5;  // s, of Housner's integral

double linear_at(std::span<const double> x, std::span<const double> y, double at) {
  const auto above = std::lower_bound(x.begin(), x.end(), at);
  if (above == x.begin()) return y.front();
  const auto i = static_cast<std::size_t>(above - x.begin());
  return std::lerp(y[i - 1], y[i], (at - x[i - 1]) / (x[i] - x[i - 1]));
}

double trapezoidal(std::span<const double> x, std::span<const double> y) {
  double sum = 0;
  for (std::size_t i = 1; i < x.size(); ++i) sum += (x[i] - x[i - 1]) * (y[i] + y[i - 1]) / 2;
  return sum;
}

}  // namespace

double housner_intensity(const PseudoVelocities& pseudo_velocities) {
  std::vector<double> periods;
  for (int i = 10; i <= 250; ++i) periods.push_back(i / 100.0);
  return trapezoidal(periods, pseudo_velocities(periods));
}

double housner_intensity(std::span<const double> periods, std::span<const double> pseudo_velocities,
                         const std::string& where) {
  if (periods.empty() || periods.front() > shortest || periods.back() < longest)
    throw input_error(where,
                      periods.empty()
                          ? std::string("found no periods")
                          : fmt::format("found periods from {:g} to {:g} s", periods.front(), periods.back()),
                      fmt::format("Housner intensity needs {:g} to {:g} s", shortest, longest));
  std::vector<double> x{shortest}, y{linear_at(periods, pseudo_velocities, shortest)};
  for (std::size_t i = 0; i < periods.size(); ++i) {
    if (periods[i] <= shortest || periods[i] >= longest) continue;
    x.push_back(periods[i]);
    y.push_back(pseudo_velocities[i]);
  }
  x.push_back(longest);
  y.push_back(linear_at(periods, pseudo_velocities, longest));
  return trapezoidal(x, y);
}

double predominant_period(const PseudoVelocities& pseudo_velocities) {
  constexpr int count = 500;
  constexpr double first = 0.02, last = 10;  // s
  std::vector<double> periods;
  for (int i = 0; i < count; ++i) periods.push_back(first * std::pow(last / first, i / (count - 1.0)));
  std::vector<double> accelerations = pseudo_velocities(periods);
  for (int i = 0; i < count; ++i) accelerations[i] *= 2 * std::numbers::pi / periods[i];
  return predominant_period(periods, accelerations);
}

double predominant_period(std::span<const double> periods, std::span<const double> spectral_accelerations) {
  const auto largest = std::max_element(spectral_accelerations.begin(), spectral_accelerations.end());
  return periods[static_cast<std::size_t>(largest - spectral_accelerations.begin())];
}

}  // namespace pilotis
