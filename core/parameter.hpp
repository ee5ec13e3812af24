// How a law or a scheme tells the outside which numbers it takes. Input files, help text, validation and the
// parameterised tests all iterate over these lists, so a new law or scheme is known everywhere by one entry.
#pragma once

#include <limits>
#include <optional>
#include <span>
#include <string>
#include <string_view>

#include "core/units/units.hpp"

namespace pilotis {

struct Parameter {
  std::string_view key;                   // as written in a study
  Dimension dimension = Dimension::none;  // a bare number is in the study's unit of this dimension
  std::string_view meaning;               // one line, for help and errors
  std::optional<double> otherwise = {};   // SI; the value when the key is absent; empty: the key is required
  double least = -std::numeric_limits<double>::infinity();  // SI
  double most = std::numeric_limits<double>::infinity();    // SI
  bool least_allowed = true;                                // false: greater than `least`
  bool most_allowed = true;                                 // false: less than `most`
  bool whole = false;                                       // true: only whole numbers
  // Not empty: the value is one of these words; as a number, its place in the list, from 0.
  std::span<const std::string_view> choices = {};
};

// A named method (law or scheme) with its parameters.
struct Method {
  std::string_view name;
  std::string_view summary;  // one line
  std::span<const Parameter> parameters;
};

// "at least 0 and less than 1" or "one of a, b", for messages; empty when any number is allowed.
std::string allowed_range(const Parameter& parameter);

// Throws Error (input) at `where` when `value` (SI) is not finite, out of range, not whole where it must be, or not the
// place of a choice.
void require_allowed(const Parameter& parameter, double value, const std::string& where);

}  // namespace pilotis
