// Files of archives that hold no accelerogram this program can use. They are known by their content, so that they are
// refused for what they are and never misread as plain text.
#pragma once

#include <span>
#include <string>
#include <string_view>

namespace pilotis {

struct NotARecord {
  std::string_view name;    // of the format
  std::string_view holds;   // what is in it
  std::string_view remedy;  // what to use instead
  bool (*recognises)(std::string_view content);
};

// In the order they are tried.
std::span<const NotARecord> not_records();

// Throws Error (input) at `where` (the file) that says what `content` is when it is one of them.
void refuse_not_records(std::string_view content, const std::string& where);

}  // namespace pilotis
