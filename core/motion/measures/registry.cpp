#include "core/motion/measures/registry.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <array>
#include <vector>

#include "core/error.hpp"
#include "core/motion/measures/fourier.hpp"
#include "core/motion/measures/intensity.hpp"

namespace pilotis {

namespace {

constexpr Measure of_record(std::string_view name, Dimension dimension, std::string_view long_name, int power,
                            double (*value)(const Accelerogram&)) {
  return {name, dimension, long_name, power, value, nullptr};
}

constexpr Measure of_spectrum(std::string_view name, Dimension dimension, std::string_view long_name, int power,
                              double (*value)(const PseudoVelocities&)) {
  return {name, dimension, long_name, power, nullptr, value};
}

constexpr std::array<Measure, 13> measures{{
    of_record("pga", Dimension::acceleration, "peak ground acceleration", 1, &peak_ground_acceleration),
    of_record("pgv", Dimension::velocity, "peak ground velocity", 1, &peak_ground_velocity),
    of_record("pgd", Dimension::length, "peak ground displacement", 1, &peak_ground_displacement),
    of_record("pgv_pga", Dimension::time, "peak ground velocity over acceleration", 0, &velocity_acceleration_ratio),
    of_record("arias", Dimension::velocity, "Arias intensity", 2, &arias_intensity),
    of_record("cav", Dimension::velocity, "cumulative absolute velocity", 1, &cumulative_absolute_velocity),
    of_record("duration_5_75", Dimension::time, "significant duration, 5 to 75 % of the Arias intensity", 0,
              &significant_duration_5_75),
    of_record("duration_5_95", Dimension::time, "significant duration, 5 to 95 % of the Arias intensity", 0,
              &significant_duration_5_95),
    of_record("duration_bracketed", Dimension::time, "bracketed duration, at or above 0.05 g", -1,
              &bracketed_duration_005g),
    of_record("rms", Dimension::acceleration, "root mean square of the acceleration over the whole record", 1,
              &rms_acceleration),
    of_record("mean_period", Dimension::time, "mean period of the Fourier amplitudes, 0.25 to 20 Hz", 0, &mean_period),
    of_spectrum("housner", Dimension::length, "Housner intensity, 5 % damped, 0.1 to 2.5 s", 1, &housner_intensity),
    of_spectrum("predominant_period", Dimension::time, "period of the largest 5 % damped spectral acceleration", 0,
                &predominant_period),
}};

}  // namespace

std::span<const Measure> measure_catalogue() { return measures; }

const Measure& measure_named(std::string_view name, const std::string& where) {
  std::vector<std::string_view> known;
  for (const Measure& measure : measures) {
    if (measure.name == name) return measure;
    known.push_back(measure.name);
  }
  throw input_error(where, fmt::format("there is no intensity measure \"{}\"", name),
                    fmt::format("one of {}", fmt::join(known, ", ")));
}

}  // namespace pilotis
