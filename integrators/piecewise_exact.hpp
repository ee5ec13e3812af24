// The exact march of a linear building under loads linear over each step, by the matrix exponential:
//   [u1; v1] = exp(A dt) [u0; v0] + load terms.
// No parameters. Exact to rounding when the step divides the record's; any damping. Stable when the building is.
// Between whole steps nothing is seen, so a peak may fall between samples by (omega dt)^2 / 8 of itself.
// Cost: 8 n^2 multiplications a step. Sources: Nigam & Jennings, "Calculation of response spectra from strong-motion
// earthquake records", Bull. Seism. Soc. Am. 59 (1969) 909 (one freedom); Van Loan 1978 (see linear_propagator.hpp).
#pragma once

#include <span>

#include "integrators/scheme.hpp"

namespace pilotis {

class PiecewiseExact : public Scheme {
 public:
  static constexpr Method method{"piecewise_exact", "exact for linear buildings and piecewise-linear loads", {}};

  static std::shared_ptr<const Scheme> make(std::span<const double> values);

  Traits traits() const override;
  std::string description() const override;
  std::unique_ptr<Stepper> prepare(const System& system, const StepSettings& settings) const override;
};

}  // namespace pilotis
