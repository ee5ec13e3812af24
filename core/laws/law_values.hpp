// The parameters of a law given back, to show them.
#pragma once

#include <vector>

#include "core/laws/registry.hpp"

namespace pilotis {

// Name, summary and parameters of the law.
const Method& law_method(const Law& law);

// SI, in the order of law_method(law).parameters: what make_law() would make the same law from.
std::vector<double> law_values(const Law& law);

}  // namespace pilotis
