#include "apps/units_text.hpp"

#include <fmt/format.h>

namespace pilotis {

std::string shown(double value) { return fmt::format("{:.6g}", value); }

std::string in_units(double si, Dimension dimension, const StudyUnits& units) {
  return shown(si / units.factor(dimension));
}

std::string with_unit(double si, Dimension dimension, const StudyUnits& units) {
  const std::string value = in_units(si, dimension, units);
  return dimension == Dimension::none ? value : value + " " + units.name(dimension);
}

std::string titled(const std::string& title, Dimension dimension, const StudyUnits& units) {
  return fmt::format("{} ({})", title, units.name(dimension));
}

}  // namespace pilotis
