#include "core/motion/target/target.hpp"

#include <fmt/format.h>

#include <numbers>
#include <utility>

#include "core/error.hpp"

namespace pilotis {

TargetSpectrum::TargetSpectrum(std::string description, double damping, double shortest, double longest,
                               std::function<double(double)> ordinate)
    : description_(std::move(description)),
      damping_(damping),
      shortest_(shortest),
      longest_(longest),
      ordinate_(std::move(ordinate)) {}

double TargetSpectrum::acceleration(double period) const {
  if (!defined_at(period))
    throw input_error("target spectrum", fmt::format("it is asked for at {:g} s", period),
                      fmt::format("it is defined from {:g} to {:g} s: {}", shortest_, longest_, description_));
  return ordinate_(period);
}

double TargetSpectrum::displacement(double period) const {
  const double inverse = period / (2 * std::numbers::pi);
  return acceleration(period) * inverse * inverse;
}

}  // namespace pilotis
