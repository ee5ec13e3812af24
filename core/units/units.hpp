// Unit names to SI factors, by UDUNITS-2 (the UCAR unit database), with the names this trade uses and UDUNITS-2 reads
// otherwise ("g" of an acceleration is standard gravity, 9.80665 m/s2, not a gram).
#pragma once

#include <string>
#include <string_view>

namespace pilotis {

inline constexpr double standard_gravity = 9.80665;  // m/s2, exact by definition (3rd CGPM, 1901)

// The dimensions a study or a record can state.
// A frequency is in cycles per time (Hz); a rate (per_time) may also be an angular one (1/s, rad/s).
enum class Dimension {
  none,
  length,
  time,
  mass,
  force,
  stiffness,
  dashpot,
  velocity,
  acceleration,
  moment,
  per_time,
  frequency,
  stress,
  density,
  slowness,
  spectral_density,
};

// SI unit of a dimension as text, e.g. "N/m"; "1" for none.
std::string_view si_unit(Dimension dimension);
// The trade's word for it, e.g. "stiffness (force/length)".
std::string_view dimension_name(Dimension dimension);

// The factor that takes a number in `unit` to SI. Throws Error (input) at `where` when the unit is unknown or has
// another dimension; the message names the unit found and what is allowed.
double si_factor(std::string_view unit, Dimension dimension, const std::string& where);

// True when `unit` names a unit of this dimension.
bool is_unit_of(std::string_view unit, Dimension dimension);

}  // namespace pilotis
