#include "core/laws/trilinear.hpp"

#include <fmt/format.h>

#include "core/error.hpp"

namespace pilotis {

Trilinear Trilinear::make(std::span<const double> v) {
  const Trilinear law{v[0], v[1], v[2], v[3], v[4]};
  if (law.yield_shear <= law.cracking_shear)
    throw input_error("yield_shear", fmt::format("found {:g} N", law.yield_shear),
                      fmt::format("it must be greater than cracking_shear, {:g} N", law.cracking_shear));
  if (law.post_yield_ratio >= law.cracked_ratio)
    throw input_error("post_yield_ratio", fmt::format("found {:g}", law.post_yield_ratio),
                      fmt::format("it must be less than cracked_ratio, {:g}", law.cracked_ratio));
  return law;
}

}  // namespace pilotis
