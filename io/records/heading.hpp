// What one cell of a heading says, e.g. "acceleration (m/s^2)", "time [s]", "velocity", "g".
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace pilotis {

enum class Role { unknown, time, acceleration, velocity, displacement };

struct Heading {
  std::string text;           // as written
  std::string name;           // without the unit; empty when the cell is only a unit
  Role role = Role::unknown;  // by its name, else by its unit
  std::string unit;           // in brackets or after "in"; a whole cell that is a unit; empty when none
  bool bracketed = false;     // the unit stands in ( ) or [ ]
};

// "peak acceleration", "spectral acceleration" and the like are no time series: their role is unknown.
Heading heading_of(std::string_view cell);

// A line as the headings of `columns` columns, whatever it is separated by; empty when it does not come apart so.
std::vector<Heading> headings_of(std::string_view line, std::size_t columns);

// `unit` as the unit library knows it: as written, else in lower case (headers of archives shout).
std::string known_unit(std::string_view unit);

}  // namespace pilotis
