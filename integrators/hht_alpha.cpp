#include "integrators/hht_alpha.hpp"

#include <fmt/format.h>

#include <cmath>

#include "integrators/implicit_stepper.hpp"

namespace pilotis {

HhtAlpha::HhtAlpha(double alpha) : coefficients_{(1 - alpha) * (1 - alpha) / 4, (1 - 2 * alpha) / 2, alpha} {}

std::shared_ptr<const Scheme> HhtAlpha::make(std::span<const double> v) { return std::make_shared<HhtAlpha>(v[0]); }

Traits HhtAlpha::traits() const {
  Traits traits;
  traits.spectral_radius = (1 + coefficients_.alpha) / (1 - coefficients_.alpha);
  // Period error at small steps, (beta/2 - 1/24) (omega dt)^2 with this beta: an upper estimate.
  traits.accurate_omega_dt = std::sqrt(0.002 / (coefficients_.beta / 2 - 1.0 / 24));
  return traits;
}

std::string HhtAlpha::description() const { return fmt::format("hht_alpha (alpha {:.4g})", coefficients_.alpha); }

std::unique_ptr<Stepper> HhtAlpha::prepare(const System& system, const StepSettings& settings) const {
  return make_implicit_stepper(system, coefficients_, settings);
}

}  // namespace pilotis
