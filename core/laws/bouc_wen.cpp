#include "core/laws/bouc_wen.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"

namespace pilotis {

BoucWen BoucWen::make(std::span<const double> v) {
  BoucWen law{v[0], v[1], v[2], v[3], v[4], v[5], v[6], 0};
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
  // z_u = (A / (beta + gamma))^(1/n), put so that gamma = -beta gives a rate of 0.
  const double n = law.exponent;
  law.loading_rate = n * std::pow(law.beta + law.gamma, 1 / n) * std::pow(law.A, 1 - 1 / n);
  return law;
}

}  // namespace pilotis
