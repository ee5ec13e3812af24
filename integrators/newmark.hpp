// Newmark's method:
//   u1 = u0 + dt v0 + dt^2 ((1/2 - beta) a0 + beta a1),   v1 = v0 + dt ((1 - gamma) a0 + gamma a1), equilibrium at t1.
// Parameters: beta in [0, 1/2], gamma in [1/2, 1]. Average acceleration: 1/4, 1/2; linear acceleration: 1/6, 1/2;
// central difference: 0, 1/2. Order: 2 for gamma = 1/2, 1 above. Stability: unconditional for 2 beta >= gamma, else
// omega dt <= 1/sqrt(gamma/2 - beta) (undamped). Dissipation: none at gamma = 1/2; about (gamma - 1/2) omega dt / 2 of
// critical above. Period error at gamma = 1/2: (beta/2 - 1/24) (omega dt)^2. Start: a0 from equilibrium at t = 0.
// Source: Newmark, "A method of computation for structural dynamics", J. Eng. Mech. Div. ASCE 85 (1959) 67.
// Order as measured: tests/integrators/order_test.cpp.
#pragma once

#include <array>
#include <span>

#include "integrators/implicit_step.hpp"
#include "integrators/scheme.hpp"

namespace pilotis {

class Newmark : public Scheme {
 public:
  static constexpr std::array parameters{Parameter{"beta", Dimension::none, "Newmark's beta", 0.25, 0.0, 0.5},
                                         Parameter{"gamma", Dimension::none, "Newmark's gamma", 0.5, 0.5, 1.0}};
  static constexpr Method method{"newmark", "Newmark beta, gamma; average acceleration unless given", parameters};
  static constexpr Method average{"average_acceleration", "Newmark, beta = 1/4, gamma = 1/2", {}};
  static constexpr Method linear{"linear_acceleration", "Newmark, beta = 1/6, gamma = 1/2", {}};

  Newmark(double beta, double gamma, std::string_view name = method.name);
  static std::shared_ptr<const Scheme> make(std::span<const double> values);

  Traits traits() const override;
  std::string description() const override;
  std::unique_ptr<Stepper> prepare(const System& system, const StepSettings& settings) const override;
  const ImplicitCoefficients* implicit() const override { return &coefficients_; }

 private:
  ImplicitCoefficients coefficients_;
  std::string_view name_;
};

}  // namespace pilotis
