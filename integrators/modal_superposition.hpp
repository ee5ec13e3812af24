// Modal superposition of a linear building with classical damping: every mode q'' + 2 zeta omega q' + omega^2 q =
// phi^T p is marched exactly over each step (load linear), u = sum phi q.
// Parameter: modes, how many are kept from the lowest; 0: all. With all modes it is exact; with fewer, what the others
// would add is missing (look at the effective masses), and accelerations from equilibrium are rougher than drifts.
// Damping that couples modes (dashpots in general) is refused. Source: Chopra, Dynamics of Structures, ch. 12-13; the
// step as in linear_propagator.hpp.
#pragma once

#include <array>
#include <span>

#include "integrators/scheme.hpp"

namespace pilotis {

class ModalSuperposition : public Scheme {
 public:
  static constexpr std::array parameters{
      Parameter{"modes", Dimension::none, "the number of modes kept (0: all)", 0.0, 0.0, 1e6, true, true, true}};
  static constexpr Method method{"modal", "modal superposition, each mode marched exactly", parameters};

  explicit ModalSuperposition(int modes) : modes_(modes) {}
  static std::shared_ptr<const Scheme> make(std::span<const double> values);

  Traits traits() const override;
  std::string description() const override;
  std::unique_ptr<Stepper> prepare(const System& system, const StepSettings& settings) const override;

 private:
  int modes_;
};

}  // namespace pilotis
