#include "integrators/modal_superposition.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "core/system/modes.hpp"
#include "integrators/linear_propagator.hpp"
#include "integrators/piecewise_exact.hpp"

namespace pilotis {

namespace {

// Throws when phi^T C phi is not diagonal to a billionth of its largest entry.
void require_classical(const Eigen::MatrixXd& modal) {
  const double largest = modal.cwiseAbs().maxCoeff();
  const Eigen::MatrixXd coupling = modal - Eigen::MatrixXd(modal.diagonal().asDiagonal());
  if (coupling.cwiseAbs().maxCoeff() > 1e-9 * largest)
    throw input_error(
        "march.scheme",
        "modal superposition needs damping that does not couple the modes, and the dashpots of this building do",
        "Rayleigh or modal damping alone without P-Delta, or the scheme piecewise_exact");
}

class ModalStepper : public Stepper {
 public:
  ModalStepper(const System& system, int modes, double dt) : n_(system.freedoms), kept_(modes) {
    const ModalBasis basis = modal_basis(system.stiffness, system.mass);
    shapes_ = basis.shapes.leftCols(kept_);
    project_ = shapes_.transpose() * Eigen::Map<const Eigen::VectorXd>(system.mass.data(), n_).asDiagonal();
    const Eigen::MatrixXd damping = basis.shapes.transpose() * dense_damping(system) * basis.shapes;
    require_classical(damping);
    for (int j = 0; j < kept_; ++j)
      steps_.push_back(linear_propagator(Eigen::VectorXd::Ones(1), damping.block(j, j, 1, 1),
                                         Eigen::MatrixXd::Constant(1, 1, basis.omega_squared[j]), dt));
    q_.resize(kept_), rate_.resize(kept_), before_.resize(kept_), after_.resize(kept_);
  }

  StepResult step(State<double>& state, const LoadStep& load) noexcept override {
    Eigen::Map<Eigen::VectorXd> u(state.u.data(), n_), v(state.v.data(), n_);
    q_.noalias() = project_ * u;
    rate_.noalias() = project_ * v;
    before_.noalias() = shapes_.transpose() * Eigen::Map<const Eigen::VectorXd>(load.before, n_);
    after_.noalias() = shapes_.transpose() * Eigen::Map<const Eigen::VectorXd>(load.after, n_);
    for (int j = 0; j < kept_; ++j) step_mode(j);
    u.noalias() = shapes_ * q_;
    v.noalias() = shapes_ * rate_;
    return {};
  }

 private:
  void step_mode(int j) noexcept {
    const auto& [transition, hold, ramp] = steps_[j];
    const double q = q_[j], r = rate_[j], p = before_[j], rise = after_[j] - before_[j];
    q_[j] = transition(0, 0) * q + transition(0, 1) * r + hold(0, 0) * p + ramp(0, 0) * rise;
    rate_[j] = transition(1, 0) * q + transition(1, 1) * r + hold(1, 0) * p + ramp(1, 0) * rise;
  }

  Eigen::Index n_;
  int kept_;
  Eigen::MatrixXd shapes_, project_;  // [freedom][mode], [mode][freedom]
  std::vector<LinearPropagator> steps_;
  Eigen::VectorXd q_, rate_, before_, after_;
};

}  // namespace

std::shared_ptr<const Scheme> ModalSuperposition::make(std::span<const double> v) {
  return std::make_shared<ModalSuperposition>(static_cast<int>(v[0]));
}

Traits ModalSuperposition::traits() const { return PiecewiseExact{}.traits(); }

std::string ModalSuperposition::description() const {
  return modes_ == 0 ? "modal (all modes)" : fmt::format("modal ({} modes)", modes_);
}

std::unique_ptr<Stepper> ModalSuperposition::prepare(const System& system, const StepSettings& settings) const {
  require_linear(system, "modal superposition");
  if (modes_ > system.freedoms)
    throw input_error("march.scheme.modes", fmt::format("found {}", modes_),
                      fmt::format("the building has {} modes", system.freedoms));
  return std::make_unique<ModalStepper>(system, modes_ == 0 ? system.freedoms : modes_, settings.dt);
}

}  // namespace pilotis
