// Every target spectrum that is made from a few numbers, listed once. A new one: its header in this folder, its name in
// registry.cpp. A table of the user's is made by table.hpp.
#pragma once

#include <span>
#include <string>
#include <string_view>

#include "core/motion/target/target.hpp"
#include "core/parameter.hpp"

namespace pilotis {

std::span<const Method> target_catalogue();

// From the name and its parameters (SI, in the order of Method::parameters). Throws Error (input) at `where` when the
// name is unknown, a value is out of range, or the values do not go together.
TargetSpectrum make_target(std::string_view name, std::span<const double> values, const std::string& where);

}  // namespace pilotis
