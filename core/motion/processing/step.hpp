// What every processing step gives back. A step is a struct with `method` (name, summary, parameters), `make` (from
// numbers in the order of its parameters) and `applied`; registry.cpp lists them all.
#pragma once

#include <array>
#include <span>
#include <string>
#include <string_view>

#include "core/motion/accelerogram.hpp"
#include "core/parameter.hpp"

namespace pilotis {

// The record after a step, and one line that says what was done, with numbers and units, to be kept with the results.
struct Processed {
  Accelerogram record;
  std::string done;
};

// How a filter is run.
enum class Pass { acausal, causal };
inline constexpr std::array<std::string_view, 2> pass_words{"acausal", "causal"};  // in the order of Pass

}  // namespace pilotis
