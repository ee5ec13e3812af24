// Numbers in a study's units, for the screen.
#pragma once

#include <string>

#include "io/study/study.hpp"

namespace pilotis {

// Six significant digits.
std::string shown(double value);
// An SI value in the study's unit, without and with the unit's name.
std::string in_units(double si, Dimension dimension, const StudyUnits& units);
std::string with_unit(double si, Dimension dimension, const StudyUnits& units);
// "height (m)"
std::string titled(const std::string& title, Dimension dimension, const StudyUnits& units);

}  // namespace pilotis
