// The exact solution of a linear system over one step under a load linear in time:
//   [u1; v1] = transition [u0; v0] + hold p0 + ramp (p1 - p0)
#pragma once

#include <Eigen/Dense>

namespace pilotis {

struct LinearPropagator {
  Eigen::MatrixXd transition;  // [2n][2n]
  Eigen::MatrixXd hold, ramp;  // [2n][n], per N
};

// M (diagonal, kg), C (N s/m), K (N/m), step (s). From the exponential of the system augmented by its load (Van Loan,
// "Computing integrals involving the matrix exponential", IEEE Trans. Autom. Control 23 (1978) 395).
LinearPropagator linear_propagator(const Eigen::VectorXd& mass, const Eigen::MatrixXd& damping,
                                   const Eigen::MatrixXd& stiffness, double step);

}  // namespace pilotis
