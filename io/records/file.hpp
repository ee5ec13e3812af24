// The bytes of a file, or an error that says who has to act.
#pragma once

#include <filesystem>
#include <string>
#include <string_view>

namespace pilotis {

// Throws Error: input when the file is not there, is a folder or no ordinary file, is empty or larger than a record can
// be; outside when permission or the disk is the trouble.
std::string content_of(const std::filesystem::path& file);

// The text of a file: what stands before a DOS end-of-file mark (control-Z). Behind it only more of them, zero bytes
// and blanks may stand. Refuses what is not text: zero bytes and the like. `where` is the file. Throws Error (input).
std::string_view text_of(std::string_view content, const std::string& where);

}  // namespace pilotis
