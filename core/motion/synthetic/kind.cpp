#include "core/motion/synthetic/kind.hpp"

#include <fmt/format.h>

#include <cmath>
#include <stdexcept>

#include "core/error.hpp"

namespace pilotis {

std::size_t SyntheticInput::place_of(std::string_view key) const {
  const auto& parameters = kind_.method.parameters;
  for (std::size_t i = 0; i < parameters.size(); ++i)
    if (parameters[i].key == key) return i;
  throw std::logic_error(std::string(kind_.method.name) + " has no parameter " + std::string(key));
}

double SyntheticInput::operator[](std::string_view key) const { return values_[place_of(key)]; }

std::string_view SyntheticInput::choice(std::string_view key) const {
  const std::size_t place = place_of(key);
  return kind_.method.parameters[place].choices[static_cast<std::size_t>(values_[place])];
}

const Curve& SyntheticInput::curve(std::string_view key) const {
  for (std::size_t i = 0; i < kind_.curves.size(); ++i)
    if (kind_.curves[i].key == key) return curves_[i];
  throw std::logic_error(std::string(kind_.method.name) + " has no table " + std::string(key));
}

std::size_t SyntheticInput::count() const {
  return static_cast<std::size_t>(std::lround(grid.duration / grid.step)) + 1;
}

void require_fine_step(const SyntheticInput& input, std::string_view key, double period) {
  if (input.grid.step > period / 10 * (1 + 1e-9))
    throw input_error(
        input.at("step"), fmt::format("found a step of {} s", input.grid.step),
        fmt::format("it must be at most a tenth of the {:.6g} s of {}, {:.6g} s", period, key, period / 10));
}

}  // namespace pilotis
