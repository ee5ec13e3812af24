// The seam of the integration schemes. A Scheme is a small immutable set of parameters with traits; prepared for a
// system and a step it gives a Stepper, which owns the workspace and takes states forward. Schemes see the system's
// residual and its effective solve, never the kind of building.
#pragma once

#include <limits>
#include <memory>
#include <string>

#include "core/system/kernel.hpp"

namespace pilotis {

struct ImplicitCoefficients;

struct Traits {
  int order = 2;  // of displacement and velocity for smooth loads and laws; 0: exact
  bool implicit = true;
  bool adaptive = false;     // chooses its own steps inside the interval it is asked for
  bool linear_only = false;  // refuses elements that are not linear
  double stability_limit = std::numeric_limits<double>::infinity();  // largest omega dt; infinite: unconditional
  double spectral_radius = 1;      // at infinite omega dt; 1: no numerical damping there
  double accurate_omega_dt = 0.1;  // rad, where a mode's period and amplitude per cycle err by about 0.2 %
};

// p - M iota a_g at both ends of a step, linear between.
template <class R>
struct LoadStepOver {
  R dt{};                     // s, > 0
  const R* before = nullptr;  // N, [freedom]
  const R* after = nullptr;   // N, [freedom]
};
using LoadStep = LoadStepOver<double>;

enum class StepStatus { done, retry_smaller, failed };

struct StepResult {
  StepStatus status = StepStatus::done;
  double share = 1;  // of dt that was taken, (0, 1]; less than 1 only for adaptive schemes
};

class Stepper {
 public:
  virtual ~Stepper() = default;
  // Takes u, v, a and the memories of `state` over the step (its clock is the loop's business). Unless done, the state
  // is left as it was. Does not allocate or throw; may leave non-finite numbers, which the loop checks for.
  virtual StepResult step(State<double>& state, const LoadStep& load) noexcept = 0;
  // The internal forces at the state of the last step that was done, where the scheme has them at hand; else null.
  virtual Forces<double>* forces() noexcept { return nullptr; }
};

// How a stepper is to be prepared.
struct StepSettings {
  double dt = 0;         // s, the whole step; halved ones may be asked for too, unless the scheme is exact
  double tolerance = 0;  // N, largest out-of-balance force of an implicit step
};

class Scheme {
 public:
  virtual ~Scheme() = default;
  virtual Traits traits() const = 0;
  // Name and parameters, e.g. "newmark (beta 0.25, gamma 0.5)".
  virtual std::string description() const = 0;
  // Throws Error (input) when the scheme cannot march this system, saying which element or property stands against it.
  virtual std::unique_ptr<Stepper> prepare(const System& system, const StepSettings& settings) const = 0;
  // Not null: a scheme of the Newmark family, which can march many runs in lanes (integrators/march_lanes.hpp).
  virtual const ImplicitCoefficients* implicit() const { return nullptr; }
  // The same scheme with tolerances a hundred times tighter, for error checks of adaptive schemes; null for the others,
  // whose check halves the step alone.
  virtual std::shared_ptr<const Scheme> refined() const { return nullptr; }
};

// Throws Error (input) when `system` has elements that are not linear. `scheme` names the scheme in the message.
void require_linear(const System& system, const std::string& scheme);

}  // namespace pilotis
