#include "core/laws/bouc_wen.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"

namespace pilotis {

// z_u = (A / (beta + gamma))^(1/n), put so that gamma = -beta gives a rate of 0.
BoucWen::BoucWen(double k, double f_y, double r, double n, double beta_, double gamma_, double A_)
    : stiffness(k),
      yield_shear(f_y),
      post_yield_ratio(r),
      exponent(n),
      beta(beta_),
      gamma(gamma_),
      A(A_),
      loading_rate(n * std::pow(beta_ + gamma_, 1 / n) * std::pow(A_, 1 - 1 / n)) {}

BoucWen BoucWen::make(std::span<const double> v) {
  const BoucWen law{v[0], v[1], v[2], v[3], v[4], v[5], v[6]};
  if (std::abs(law.gamma) > law.beta)
    throw input_error(
        "gamma", fmt::format("found {:g}", law.gamma),
        fmt::format("it must lie between -beta and beta, {:g}, or a loop could give energy back", law.beta));
  const double r = law.post_yield_ratio, least_A = -r / (1 - r);
  if (law.A <= least_A)
    throw input_error("A", fmt::format("found {:g}", law.A),
                      fmt::format("with a post_yield_ratio of {:g} it must be greater than {:g}, or the initial "
                                  "stiffness is not positive",
                                  r, least_A));
  return law;
}

}  // namespace pilotis
