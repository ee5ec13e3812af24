// A building in a file of its own, for a study of several.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "io/study/study.hpp"

namespace pilotis {

// A building file has title, [units], [building] and [[story]]; without [units] it is in SI, which is added to `notes`.
// Named by its stem. Throws Error with file, line, key, what was found and what is allowed; a whole study is refused.
StudyBuilding read_building_file(const std::filesystem::path& file, std::vector<std::string>& notes);

// Whether the file is a building file rather than a study: TOML with a building and nothing to do. Throws Error when it
// cannot be read or is not TOML.
bool is_building_file(const std::filesystem::path& file);

}  // namespace pilotis
