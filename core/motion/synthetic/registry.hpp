// Every kind of made motion, listed once. A new kind: its header in this folder, its name in registry.cpp; nothing
// else.
#pragma once

#include <span>
#include <string>
#include <string_view>

#include "core/motion/accelerogram.hpp"
#include "core/motion/synthetic/grid.hpp"
#include "core/parameter.hpp"

namespace pilotis {

std::span<const Method> synthetic_catalogue();

// A motion from the name of its kind, its parameters (SI, in the order of Method::parameters), and the grid. Throws
// Error (input) at `where` when the name is unknown, a value is out of range, or the values do not go together.
Accelerogram make_synthetic(std::string_view name, std::span<const double> values, const SyntheticGrid& grid,
                            const std::string& where);

}  // namespace pilotis
