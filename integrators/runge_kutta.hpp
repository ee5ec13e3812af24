// Adaptive explicit Runge-Kutta, by Boost.Odeint: Dormand-Prince 5(4) and Fehlberg 7(8).
// Parameters: rtol, atol. A step is accepted when every displacement (m) and velocity (m/s) has an error estimate below
// atol + rtol (|x| + h |x'|).
// Laws answer from the memory committed at the last accepted step. A reversal inside a step would be missed by that, so
// a step in which a missed reversal changes some element's force noticeably (by more than the tolerance times its
// stiffness) is cut at the reversal.
// Order: 5 and 8 (local extrapolation) while laws and loads are smooth; 4 with the Bouc-Wen law, itself integrated
// along the deformation by a fourth-order rule. Stability: by the error control. Sources: Dormand & Prince, J. Comp.
// Appl. Math. 6 (1980) 19; Fehlberg, NASA TR R-287 (1968); Ahnert & Mulansky, "Odeint", AIP Conf. Proc. 1389 (2011)
// 1586. Order as measured: tests/integrators/order_test.cpp.
#pragma once

#include <array>
#include <span>

#include "integrators/scheme.hpp"

namespace pilotis {

class RungeKutta : public Scheme {
 public:
  enum class Pair { dormand_prince, fehlberg };

  static constexpr std::array parameters{
      Parameter{"rtol", Dimension::none, "the relative tolerance of a step", 1e-6, 1e-14, 0.1},
      Parameter{"atol", Dimension::none, "the absolute tolerance of a step (m and m/s)", 1e-9, 1e-16, 1.0}};
  static constexpr Method dormand_prince{"dormand_prince", "adaptive Runge-Kutta 5(4)", parameters};
  static constexpr Method fehlberg{"fehlberg", "adaptive Runge-Kutta 7(8)", parameters};

  RungeKutta(Pair pair, double rtol, double atol) : pair_(pair), rtol_(rtol), atol_(atol) {}

  Traits traits() const override;
  std::string description() const override;
  std::unique_ptr<Stepper> prepare(const System& system, const StepSettings& settings) const override;
  std::shared_ptr<const Scheme> refined() const override;

 private:
  Pair pair_;
  double rtol_, atol_;
};

}  // namespace pilotis
