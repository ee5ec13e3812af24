// Modes of vibration: K phi = omega^2 M phi, with the initial stiffness.
#pragma once

#include <Eigen/Dense>
#include <vector>

#include "core/response/results.hpp"
#include "core/system/system.hpp"

namespace pilotis {

// From the lowest frequency; shapes are mass-normalised (phi^T M phi = 1), one column per mode.
struct ModalBasis {
  Eigen::VectorXd omega_squared;  // rad2/s2; negative or zero: the mode buckles
  Eigen::MatrixXd shapes;         // [freedom][mode], kg^-1/2
};

Eigen::MatrixXd dense(const Band& band);
Eigen::MatrixXd dense_damping(const System& system);  // C, the low-rank part included

ModalBasis modal_basis(const Band& stiffness, const std::vector<double>& mass);

// Throws Error (input) when the building buckles under its own weight (a frequency that is not real).
void require_stable(const ModalBasis& basis);

// Periods, participation, effective masses, damping ratios of the assembled system, P-Delta included.
// Throws Error (input), see require_stable().
std::vector<Mode> modes_of(const System& system);

}  // namespace pilotis
