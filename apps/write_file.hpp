// Writing a file so that it is whole or absent.
#pragma once

#include <filesystem>
#include <string_view>

namespace pilotis {

// Writes `content` beside `file` under a temporary name and renames it, replacing what was there. Throws Error: input
// when the folder is not there, outside when disk or permission is the trouble; then nothing is left behind.
void write_whole(const std::filesystem::path& file, std::string_view content);

}  // namespace pilotis
