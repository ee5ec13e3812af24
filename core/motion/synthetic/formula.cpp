#include "core/motion/synthetic/formula.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "core/error.hpp"

namespace pilotis {

void require_within(const SyntheticInput& input, std::string_view key, double from, double to) {
  const double rounding = 1e-9 * input.grid.step;
  if (from >= -rounding && to <= input.grid.duration + rounding) return;
  throw input_error(input.at(key),
                    fmt::format("found {} s, by which it lasts from {:.6g} to {:.6g} s", input[key], from, to),
                    fmt::format("it must lie within 0 and the duration, {} s", input.grid.duration));
}

double ramped(double time, double ramp, double duration) {
  if (ramp == 0) return 1;
  return std::clamp(std::min(time, duration - time) / ramp, 0.0, 1.0);
}

}  // namespace pilotis
