// The bytes of a file, or an error that says who has to act.
#pragma once

#include <filesystem>
#include <string>
#include <string_view>

namespace pilotis {

// Throws Error: input when the file is not there, is a folder or no ordinary file, is empty or larger than a record can
// be; outside when permission or the disk is the trouble.
std::string content_of(const std::filesystem::path& file);

// Refuses what is not text: zero bytes and the like. `where` is the file. Throws Error (input).
void require_text(std::string_view content, const std::string& where);

}  // namespace pilotis
