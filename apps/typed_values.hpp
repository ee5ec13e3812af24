// Numbers and words as they are typed on a command line, for commands whose options come from lists of parameters.
#pragma once

#include <string>
#include <string_view>

#include "core/parameter.hpp"

namespace pilotis {

// "--ground-period" for "ground_period".
std::string option_name(std::string_view key);

// "0.35 g", "0.35g" or, in SI, "3.4": the number in SI. Throws Error (input) at `where`.
double typed_quantity(const std::string& text, Dimension dimension, const std::string& where);

// What was typed for the option of a parameter, or its usual value where nothing was; of a choice its place. Throws
// Error (input) at "<command> --option" when it is missing or no such number; ranges are checked by who takes the
// value.
double typed_value(const Parameter& parameter, const std::string& typed, std::string_view command);

// The value as it can be typed again: "\"0.35 m/s2\"", a bare number, a word.
std::string value_text(const Parameter& parameter, double value);

// One line for help: meaning, unit, usual value, range.
std::string help_of(const Parameter& parameter);
// "required", or the usual value.
std::string default_text(const Parameter& parameter);

}  // namespace pilotis
