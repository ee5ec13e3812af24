// Which files a path or a pattern with *, ? or [...] (POSIX glob) means.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

namespace pilotis {

bool is_file_pattern(const std::string& text);

// `text` with every character of a pattern made an ordinary one.
std::string without_pattern(const std::string& text);

// The matches sorted by name, folders left out; none where nothing matches. Throws Error (outside) at `where` when the
// folder cannot be searched.
std::vector<std::filesystem::path> files_matching(const std::string& pattern, const std::string& where);

}  // namespace pilotis
