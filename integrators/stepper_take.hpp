// The scheme seam as the stepping loop calls it.
#pragma once

#include "integrators/lane_loop.hpp"
#include "integrators/scheme.hpp"

namespace pilotis {

struct StepperTake {
  Stepper& stepper;

  Taken<double> operator()(State<double>& state, const LoadStep& load) noexcept {
    const StepResult result = stepper.step(state, load);
    return {result.status == StepStatus::done, result.status == StepStatus::failed, result.share, stepper.forces()};
  }
};

}  // namespace pilotis
