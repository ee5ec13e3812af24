// The buildings of a study as systems, and which one is meant.
#pragma once

#include <string>
#include <vector>

#include "core/response/results.hpp"
#include "core/system/system.hpp"
#include "io/study/study.hpp"

namespace pilotis {

struct AssembledBuilding {
  System system;
  BuildingSummary summary;  // its title is the building's
};

// Throws Error (input) that names the building when it cannot be assembled or buckles under its own weight.
AssembledBuilding assembled(const StudyBuilding& building);

// The building called `name`; the only one when `name` is empty. Throws Error (input) at `where` that lists the names
// when there is none of that name, or several to choose from.
const StudyBuilding& building_called(const std::vector<StudyBuilding>& buildings, const std::string& name,
                                     const std::string& where);

}  // namespace pilotis
