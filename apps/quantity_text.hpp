// A number with its unit as typed on the command line.
#pragma once

#include <string>

#include "core/units/units.hpp"

namespace pilotis {

// "0.35 g", "0.35g" or, in SI, "3.4"; the answer is in SI. Throws Error (input) at `where`.
double quantity_of(const std::string& text, Dimension dimension, const std::string& where);

}  // namespace pilotis
