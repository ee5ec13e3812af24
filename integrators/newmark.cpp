#include "integrators/newmark.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "integrators/implicit_stepper.hpp"

namespace pilotis {

Newmark::Newmark(double beta, double gamma, std::string_view name) : coefficients_{beta, gamma, 0}, name_(name) {}

std::shared_ptr<const Scheme> Newmark::make(std::span<const double> v) { return std::make_shared<Newmark>(v[0], v[1]); }

Traits Newmark::traits() const {
  const auto [beta, gamma, alpha] = coefficients_;
  Traits traits;
  traits.order = gamma == 0.5 ? 2 : 1;
  if (2 * beta < gamma) traits.stability_limit = 1 / std::sqrt(gamma / 2 - beta);
  // Spectral radius at infinity (undamped), from the amplification matrix: for beta > 0 the roots of
  // r^2 - (2 - (gamma + 1/2)/beta) r + 1 - (gamma - 1/2)/beta = 0.
  if (beta > 0) {
    const double half_trace = 1 - (gamma + 0.5) / (2 * beta), determinant = 1 - (gamma - 0.5) / beta;
    const double discriminant = half_trace * half_trace - determinant;
    traits.spectral_radius = discriminant > 0 ? std::abs(half_trace) + std::sqrt(discriminant) : std::sqrt(determinant);
  } else {
    traits.spectral_radius = std::numeric_limits<double>::infinity();
  }
  // 0.2 % of period, and 0.2 % of amplitude a cycle: pi (gamma - 1/2) omega dt; never more than 0.3 rad.
  const double period = std::sqrt(0.002 / std::max(std::abs(beta / 2 - 1.0 / 24), 1e-3));
  const double damping = gamma > 0.5 ? 0.002 / (std::numbers::pi * (gamma - 0.5)) : 1.0;
  traits.accurate_omega_dt = std::min({period, damping, 0.3});
  return traits;
}

std::string Newmark::description() const {
  return fmt::format("{} (beta {:.4g}, gamma {:.4g})", name_, coefficients_.beta, coefficients_.gamma);
}

std::unique_ptr<Stepper> Newmark::prepare(const System& system, const StepSettings& settings) const {
  return make_implicit_stepper(system, coefficients_, settings);
}

}  // namespace pilotis
