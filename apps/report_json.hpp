// The facts of the profile for scripts: SI throughout, told by the object "units".
#pragma once

#include <nlohmann/json.hpp>

#include "core/verdict/limit.hpp"
#include "io/results/store.hpp"

namespace pilotis {

// What is not a number is null: a value is null where no run gave one or where collapsed runs decide it ("finding",
// "collapsed" and "not_converged" tell which), a step error where it was not estimated.
nlohmann::ordered_json report_json(const StoredStudy& stored, const Verdict& verdict);

}  // namespace pilotis
