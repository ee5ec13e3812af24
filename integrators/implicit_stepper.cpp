#include "integrators/implicit_stepper.hpp"

namespace pilotis {

namespace {

class ImplicitStepper : public Stepper {
 public:
  ImplicitStepper(const System& system, const ImplicitCoefficients& coefficients, double tolerance)
      : system_(system), coefficients_(coefficients), tolerance_(tolerance), workspace_(system) {}

  StepResult step(State<double>& state, const LoadStep& load) noexcept override {
    const bool converged =
        implicit_step(system_, coefficients_, load.dt, tolerance_, load.before, load.after, state, workspace_);
    return {converged ? StepStatus::done : StepStatus::retry_smaller, 1};
  }

  Forces<double>* forces() noexcept override { return &workspace_.forces; }

 private:
  const System& system_;
  ImplicitCoefficients coefficients_;
  double tolerance_;
  ImplicitWorkspace<double> workspace_;
};

}  // namespace

std::unique_ptr<Stepper> make_implicit_stepper(const System& system, const ImplicitCoefficients& coefficients,
                                               const StepSettings& settings) {
  return std::make_unique<ImplicitStepper>(system, coefficients, settings.tolerance);
}

}  // namespace pilotis
