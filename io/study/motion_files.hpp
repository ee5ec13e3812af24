// Which files a study means by a path or a pattern.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "io/study/table_reader.hpp"

namespace pilotis {

// The files named by the text of `value`, relative to `folder`: a path, or a pattern with *, ? or [...] (POSIX glob),
// whose matches come sorted by name, folders left out. Throws Error when there is no such file or nothing matches.
std::vector<std::filesystem::path> files_named(const ValueReader& value, const std::filesystem::path& folder);

// The whole file as text. Throws Error; `wanted` tells what kind of file is needed.
std::string read_whole(const std::filesystem::path& file, const std::string& wanted);

}  // namespace pilotis
