// The alpha method of Hilber, Hughes and Taylor: Newmark's update with equilibrium between the ends,
//   M a1 + (1 + alpha) g1 - alpha g0 = (1 + alpha) p1 - alpha p0,   gamma = (1 - 2 alpha)/2, beta = (1 - alpha)^2/4.
// Parameter: alpha in [-1/3, 0]; 0 is average acceleration.
// Order: 2. Stability: unconditional. Dissipation: high modes; spectral radius at infinite omega dt (1 + alpha)/(1 -
// alpha). Start: a0 from equilibrium at t = 0. Source: Hilber, Hughes & Taylor, "Improved numerical dissipation for
// time integration algorithms in structural dynamics", Earthq. Eng. Struct. Dyn. 5 (1977) 283. Order as measured:
// tests/integrators/order_test.cpp.
#pragma once

#include <array>
#include <span>

#include "integrators/implicit_step.hpp"
#include "integrators/scheme.hpp"

namespace pilotis {

class HhtAlpha : public Scheme {
 public:
  static constexpr std::array parameters{
      Parameter{"alpha", Dimension::none, "alpha of Hilber, Hughes and Taylor", -0.05, -1.0 / 3.0, 0.0}};
  static constexpr Method method{"hht_alpha", "Hilber-Hughes-Taylor, second order, damps the highest modes",
                                 parameters};

  explicit HhtAlpha(double alpha);
  static std::shared_ptr<const Scheme> make(std::span<const double> values);

  Traits traits() const override;
  std::string description() const override;
  std::unique_ptr<Stepper> prepare(const System& system, const StepSettings& settings) const override;
  const ImplicitCoefficients* implicit() const override { return &coefficients_; }

 private:
  ImplicitCoefficients coefficients_;
};

}  // namespace pilotis
