// Unit names of this trade that UDUNITS-2 reads otherwise or not at all. One table per case; used by units.cpp only.
#pragma once

#include <span>
#include <string>
#include <string_view>
#include <utility>

#include "core/units/units.hpp"

namespace pilotis {

// Names unknown to UDUNITS-2 that then work in any combination ("tf/cm"), and what they mean: {name, meaning}.
std::span<const std::pair<const char*, const char*>> added_names();

// The unit with the names replaced that mean something else in this dimension: "g" of an acceleration is standard
// gravity.
std::string with_trade_names(std::string_view unit, Dimension dimension);

// The unit with every "lb" read as the pound force.
std::string with_pound_as_force(std::string_view unit);

// Advice when the unit holds a name that means different things in different countries ("ton"); empty otherwise.
std::string_view ambiguous_name(std::string_view unit);

std::string_view trimmed(std::string_view text);

}  // namespace pilotis
