// Every kind of made motion, listed once. A new kind: its header in this folder with `kind` and `make`, its name in
// registry.cpp; nothing else.
#pragma once

#include <span>
#include <string>
#include <string_view>

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

std::span<const SyntheticKind> synthetic_catalogue();

// A motion from the name of its kind, its parameters (SI, in the order of the kind's method.parameters), its tables (in
// the order of kind.curves; empty ones where not given) and the grid. Throws Error (input) at `where` when the name is
// unknown, a value is out of range, or the values do not go together. Samples are rounded to 1e-6 m/s2, so that a file
// with six decimals holds the motion exactly.
MadeMotion make_synthetic(std::string_view name, std::span<const double> values, std::span<const Curve> curves,
                          const SyntheticGrid& grid, const std::string& where);

}  // namespace pilotis
