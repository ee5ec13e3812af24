// Every scheme, listed once.
#pragma once

#include <span>

#include "core/parameter.hpp"

namespace pilotis {

// Names, summaries and parameters, for study files and help.
std::span<const Method> scheme_catalogue();

}  // namespace pilotis
