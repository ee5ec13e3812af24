// Every scheme, listed once (in registry.cpp).
#pragma once

#include <memory>
#include <span>
#include <string>
#include <string_view>

#include "core/parameter.hpp"
#include "integrators/scheme.hpp"

namespace pilotis {

// Names, summaries and parameters, for study files, help and tests.
std::span<const Method> scheme_catalogue();

// A scheme from its name and its parameters in the order of its Method::parameters. Throws Error (input) at `where`
// when the name is unknown, a value is out of range, or the values do not go together.
std::shared_ptr<const Scheme> make_scheme(std::string_view name, std::span<const double> values,
                                          const std::string& where);

}  // namespace pilotis
