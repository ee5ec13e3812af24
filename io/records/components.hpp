// Which component of a file is meant, and which way it points.
#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

// Degrees clockwise from north that a name states: "90 DEG", "360", "N35E", "S16W", "N-S" (positive to the north),
// "E-W", "N", "E". In [0, 360). Empty for everything else ("UP", "HNE").
std::optional<double> azimuth_of_name(std::string_view name);

// The component that `wanted` names: by its name (case and blanks do not matter), by its azimuth ("90"), or by its
// number in the file ("channel 2"); without `wanted`, the only one. Throws Error (input) at `where`, listing the
// components, when there is none, or more than one.
const RecordComponent& chosen_component(const FileOfRecords& file, const std::optional<std::string>& wanted,
                                        const std::string& where);

// As it is listed: "channel 2: UP", "N-S".
std::string component_label(const RecordComponent& component);

}  // namespace pilotis
