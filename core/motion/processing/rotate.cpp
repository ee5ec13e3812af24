#include "core/motion/processing/rotate.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"

namespace pilotis {

namespace {

std::string grid_of(const Accelerogram& record) {
  return fmt::format("{} samples every {:g} s from {:g} s", record.samples.size(), record.step, record.first_sample_at);
}

}  // namespace

RotatedPair rotated(const Accelerogram& first, const Accelerogram& second, double angle, const std::string& where) {
  if (first.step != second.step || first.first_sample_at != second.first_sample_at ||
      first.samples.size() != second.samples.size())
    throw input_error(where, fmt::format("found {} and {}", grid_of(first), grid_of(second)),
                      "both components must stand at the same times");
  const double c = std::cos(angle), s = std::sin(angle);
  RotatedPair pair{first, second, fmt::format("rotate: by {:g} degrees", angle * 180 / std::numbers::pi)};
  for (std::size_t i = 0; i < first.samples.size(); ++i) {
    pair.first.samples[i] = c * first.samples[i] + s * second.samples[i];
    pair.second.samples[i] = c * second.samples[i] - s * first.samples[i];
  }
  return pair;
}

}  // namespace pilotis
