#include "integrators/linear_propagator.hpp"

#include <unsupported/Eigen/MatrixFunctions>

namespace pilotis {

// d/ds of [u, v, p, q] with s = t / step and q = p1 - p0, all of it over one unit of s.
LinearPropagator linear_propagator(const Eigen::VectorXd& mass, const Eigen::MatrixXd& damping,
                                   const Eigen::MatrixXd& stiffness, double step) {
  const Eigen::Index n = mass.size();
  const Eigen::VectorXd flexibility = mass.cwiseInverse();
  const Eigen::MatrixXd identity = Eigen::MatrixXd::Identity(n, n);
  Eigen::MatrixXd rate = Eigen::MatrixXd::Zero(4 * n, 4 * n);
  rate.block(0, n, n, n) = step * identity;
  rate.block(n, 0, n, n) = -step * (flexibility.asDiagonal() * stiffness);
  rate.block(n, n, n, n) = -step * (flexibility.asDiagonal() * damping);
  rate.block(n, 2 * n, n, n) = step * Eigen::MatrixXd(flexibility.asDiagonal());
  rate.block(2 * n, 3 * n, n, n) = identity;
  const Eigen::MatrixXd whole = rate.exp();
  return {whole.block(0, 0, 2 * n, 2 * n), whole.block(0, 2 * n, 2 * n, n), whole.block(0, 3 * n, 2 * n, n)};
}

}  // namespace pilotis
