#include "core/system/modes.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"

namespace pilotis {

Eigen::MatrixXd dense(const Band& band) {
  Eigen::MatrixXd full = Eigen::MatrixXd::Zero(band.n, band.n);
  for (int i = 0; i < band.n; ++i)
    for (int j = 0; j < band.n; ++j) full(i, j) = band.at(i, j);
  return full;
}

Eigen::MatrixXd dense_damping(const System& system) {
  Eigen::MatrixXd full = dense(system.damping);
  for (std::size_t j = 0; j < system.modal_damping.weight.size(); ++j) {
    const Eigen::Map<const Eigen::VectorXd> w(system.modal_damping.columns[j].data(), system.freedoms);
    full += system.modal_damping.weight[j] * w * w.transpose();
  }
  return full;
}

// With M diagonal the problem is the ordinary one of M^-1/2 K M^-1/2: symmetric, and scaled by the masses.
ModalBasis modal_basis(const Band& stiffness, const std::vector<double>& mass) {
  const Eigen::Map<const Eigen::VectorXd> m(mass.data(), stiffness.n);
  const Eigen::VectorXd root = m.array().rsqrt();
  const Eigen::MatrixXd scaled = root.asDiagonal() * dense(stiffness) * root.asDiagonal();
  const Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd> solver(scaled);
  return {solver.eigenvalues(), root.asDiagonal() * solver.eigenvectors()};
}

void require_stable(const ModalBasis& basis) {
  if (basis.omega_squared[0] <= 0)
    throw input_error(
        "building",
        fmt::format("it buckles under its own weight: omega^2 of mode 1 is {:.4g} rad2/s2", basis.omega_squared[0]),
        "each story needs a stiffness well above P/h (weights above over story height)");
}

namespace {

// Largest magnitude 1, the last freedom (roof) positive.
std::vector<double> scaled_shape(const Eigen::VectorXd& shape, double& scale) {
  Eigen::Index largest = 0;
  shape.cwiseAbs().maxCoeff(&largest);
  const double roof = shape[shape.size() - 1];
  scale = std::copysign(1.0, roof) / std::abs(shape[largest]);
  const Eigen::VectorXd scaled = shape * scale;
  return {scaled.data(), scaled.data() + scaled.size()};
}

}  // namespace

std::vector<Mode> modes_of(const System& system) {
  const ModalBasis basis = modal_basis(initial_stiffness(system), system.mass);
  require_stable(basis);
  const Eigen::MatrixXd damping = dense_damping(system);
  const Eigen::Map<const Eigen::VectorXd> mass(system.mass.data(), system.freedoms);
  const Eigen::Map<const Eigen::VectorXd> influence(system.influence.data(), system.freedoms);
  std::vector<Mode> modes;
  for (int j = 0; j < system.freedoms; ++j) {
    const Eigen::VectorXd shape = basis.shapes.col(j);
    const double omega = std::sqrt(basis.omega_squared[j]);
    const double excitation = shape.dot(mass.cwiseProduct(influence));
    Mode mode;
    double scale = 1;
    mode.shape = scaled_shape(shape, scale);
    mode.period = 2 * std::numbers::pi / omega;
    mode.participation = excitation / scale;
    mode.effective_mass = excitation * excitation;
    mode.damping_ratio = shape.dot(damping * shape) / (2 * omega);
    modes.push_back(mode);
  }
  return modes;
}

}  // namespace pilotis
