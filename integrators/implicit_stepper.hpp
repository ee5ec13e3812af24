// The Newmark family behind the scheme seam: one stepper for all of it.
#pragma once

#include <memory>

#include "integrators/implicit_step.hpp"
#include "integrators/scheme.hpp"

namespace pilotis {

std::unique_ptr<Stepper> make_implicit_stepper(const System& system, const ImplicitCoefficients& coefficients,
                                               const StepSettings& settings);

}  // namespace pilotis
