#include "core/motion/synthetic/point_source.hpp"

#include <cmath>
#include <numbers>

#include "core/motion/synthetic/curve.hpp"

namespace pilotis {

namespace {

using std::numbers::pi;

constexpr double reference_distance = 1000;            // R0, m
constexpr double radiation = 0.55;                     // <R_theta_phi>, mean over the sphere for shear waves
constexpr double partition = 1 / std::numbers::sqrt2;  // V, of the energy onto two components
constexpr double free_surface = 2;                     // F

double in_km(double metres) { return metres / 1e3; }
double in_bar(double pascal) { return pascal / 1e5; }
double in_dyne_cm(double newton_metres) { return newton_metres * 1e7; }
double from_dyne_cm(double dyne_cm) { return dyne_cm / 1e7; }

}  // namespace

double PointSource::moment() const { return from_dyne_cm(std::pow(10, 1.5 * magnitude + 16.05)); }

double PointSource::corner_frequency() const {
  return 4.9e6 * in_km(shear_velocity) * std::cbrt(in_bar(stress_drop) / in_dyne_cm(moment()));
}

double PointSource::source_spectrum(double frequency) const {
  const double c =
      radiation * partition * free_surface / (4 * pi * density * std::pow(shear_velocity, 3) * reference_distance);
  const double ratio = frequency / corner_frequency();
  return c * moment() / (1 + ratio * ratio);
}

double PointSource::spreading_factor() const {
  const auto [near, far] = hinge_distance;
  const double first = std::pow(reference_distance / std::min(distance, near), spreading[0]);
  if (distance <= near) return first;
  const double second = first * std::pow(near / std::min(distance, far), spreading[1]);
  return distance <= far ? second : second * std::pow(far / distance, spreading[2]);
}

double PointSource::amplitude_spectrum(double frequency) const {
  if (frequency == 0) return 0;
  const double q = quality * std::pow(frequency, quality_exponent);
  const double path = spreading_factor() * std::exp(-pi * frequency * distance / (q * quality_velocity));
  const double cut = f_max > 0 ? 1 / std::sqrt(1 + std::pow(frequency / f_max, 8)) : 1;
  const double amplification = site.x.empty() ? 1 : log_log(site, frequency);
  return source_spectrum(frequency) * path * amplification * std::exp(-pi * kappa * frequency) * cut *
         std::pow(2 * pi * frequency, 2);
}

}  // namespace pilotis
