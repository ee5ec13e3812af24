// What is said of a building beside its responses.
#pragma once

#include <string>

#include "core/building/stick.hpp"
#include "core/response/results.hpp"
#include "core/system/system.hpp"

namespace pilotis {

// Labels, heights, masses, modes and matrices. Throws Error (input) when the building buckles under its own weight.
BuildingSummary summary_of(const Stick& stick, const System& system, const std::string& title);

}  // namespace pilotis
