// Formats of public archives that are recognised so that they are never misread as plain text, but are not read yet.
#pragma once

#include <span>
#include <string>
#include <string_view>

namespace pilotis {

struct UnreadFormat {
  std::string_view name;
  bool (*recognises)(std::string_view content);
};

// In the order they are tried.
std::span<const UnreadFormat> unread_formats();

// Throws Error (input) at `where` (the file) that names the format when `content` is in one of them.
void refuse_unread_formats(std::string_view content, const std::string& where);

}  // namespace pilotis
