#include "integrators/piecewise_exact.hpp"

#include "core/system/modes.hpp"
#include "integrators/linear_propagator.hpp"

namespace pilotis {

namespace {

class ExactStepper : public Stepper {
 public:
  ExactStepper(const System& system, double dt)
      : n_(system.freedoms),
        step_(linear_propagator(Eigen::Map<const Eigen::VectorXd>(system.mass.data(), n_), dense_damping(system),
                                dense(system.stiffness), dt)),
        before_(2 * n_),
        after_(2 * n_),
        ramp_(n_) {}

  StepResult step(State<double>& state, const LoadStep& load) noexcept override {
    const Eigen::Map<const Eigen::VectorXd> p0(load.before, n_), p1(load.after, n_);
    before_.head(n_) = Eigen::Map<const Eigen::VectorXd>(state.u.data(), n_);
    before_.tail(n_) = Eigen::Map<const Eigen::VectorXd>(state.v.data(), n_);
    ramp_ = p1 - p0;
    after_.noalias() = step_.transition * before_;
    after_.noalias() += step_.hold * p0;
    after_.noalias() += step_.ramp * ramp_;
    Eigen::Map<Eigen::VectorXd>(state.u.data(), n_) = after_.head(n_);
    Eigen::Map<Eigen::VectorXd>(state.v.data(), n_) = after_.tail(n_);
    return {};
  }

 private:
  Eigen::Index n_;
  LinearPropagator step_;
  Eigen::VectorXd before_, after_, ramp_;
};

}  // namespace

std::shared_ptr<const Scheme> PiecewiseExact::make(std::span<const double>) {
  return std::make_shared<PiecewiseExact>();
}

Traits PiecewiseExact::traits() const {
  Traits traits;
  traits.order = 0;
  traits.implicit = false;
  traits.linear_only = true;
  traits.spectral_radius = 1;
  traits.accurate_omega_dt = 0.126;  // a peak between two samples is missed by at most 0.2 %: (omega dt)^2 / 8
  return traits;
}

std::string PiecewiseExact::description() const { return "piecewise_exact"; }

std::unique_ptr<Stepper> PiecewiseExact::prepare(const System& system, const StepSettings& settings) const {
  require_linear(system, "piecewise_exact");
  return std::make_unique<ExactStepper>(system, settings.dt);
}

}  // namespace pilotis
