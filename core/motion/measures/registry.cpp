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

constexpr Measure of_record(std::string_view name, Dimension dimension, std::string_view long_name,
                            std::string_view source, int power, double (*value)(const Accelerogram&)) {
  return {name, dimension, long_name, source, power, value, nullptr};
}

constexpr Measure of_spectrum(std::string_view name, Dimension dimension, std::string_view long_name,
                              std::string_view source, int power, double (*value)(const PseudoVelocities&)) {
  return {name, dimension, long_name, source, power, nullptr, value};
}

// The sources stand in full beside the functions.
constexpr std::string_view peaks = "common practice", trifunac = "Trifunac & Brady 1975, BSSA 65, 581",
                           rathje = "Rathje, Abrahamson & Bray 1998, J. Geotech. Geoenviron. Eng. 124, 150";

constexpr std::array<Measure, 13> measures{{
    of_record("pga", Dimension::acceleration, "peak ground acceleration", peaks, 1, &peak_ground_acceleration),
    of_record("pgv", Dimension::velocity, "peak ground velocity", peaks, 1, &peak_ground_velocity),
    of_record("pgd", Dimension::length, "peak ground displacement", peaks, 1, &peak_ground_displacement),
    of_record("pgv_pga", Dimension::time, "peak ground velocity over acceleration", peaks, 0,
              &velocity_acceleration_ratio),
    of_record("arias", Dimension::velocity, "Arias intensity, pi / (2 g) times the integral of a^2",
              "Arias 1970, in Seismic Design for Nuclear Power Plants, MIT Press, 438", 2, &arias_intensity),
    of_record("cav", Dimension::velocity, "cumulative absolute velocity, the integral of |a|", "EPRI 1988, NP-5930", 1,
              &cumulative_absolute_velocity),
    of_record("duration_5_75", Dimension::time, "significant duration, 5 to 75 % of the Arias intensity", trifunac, 0,
              &significant_duration_5_75),
    of_record("duration_5_95", Dimension::time, "significant duration, 5 to 95 % of the Arias intensity", trifunac, 0,
              &significant_duration_5_95),
    of_record("duration_bracketed", Dimension::time, "bracketed duration, at or above 0.05 g",
              "Bolt 1973, Proc. 5th World Conf. Earthquake Eng., 1304", -1, &bracketed_duration_005g),
    of_record("rms", Dimension::acceleration, "root mean square of the acceleration over the whole record", peaks, 1,
              &rms_acceleration),
    of_record("mean_period", Dimension::time, "mean period of the Fourier amplitudes, 0.25 to 20 Hz", rathje, 0,
              &mean_period),
    of_spectrum("housner", Dimension::length, "Housner intensity, 5 % damped, 0.1 to 2.5 s",
                "Housner 1952, Intensity of ground motion during strong earthquakes, Caltech", 1, &housner_intensity),
    of_spectrum("predominant_period", Dimension::time, "period of the largest 5 % damped spectral acceleration", rathje,
                0, &predominant_period),
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
