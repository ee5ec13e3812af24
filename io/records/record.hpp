// Reading accelerograms from files. One file per format beside this one; each is listed once in registry.cpp.
#pragma once

#include <filesystem>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// What a study says about a file that the file may not say itself. Saying what the file says differently is an error.
struct RecordHints {
  std::optional<std::string> unit;        // acceleration unit by name, e.g. "g", "cm/s2"
  std::optional<double> step;             // s
  std::optional<double> first_sample_at;  // s
};

// One component as read, in m/s2.
struct RecordFile {
  Accelerogram record;
  std::string format;              // name of the format
  std::string unit;                // the unit it was in
  std::vector<std::string> notes;  // what was assumed, one line each
};

struct RecordFormat {
  std::string_view name;     // as shown
  std::string_view summary;  // one line
  bool (*recognises)(std::string_view content);
  RecordFile (*read)(std::string_view content, const std::string& where, const RecordHints& hints);
};

// In the order they are tried; the last (plain text) takes what no other recognises.
std::span<const RecordFormat> record_formats();

// Recognised by content, never by extension. Throws Error naming file, line, what was found and what is allowed.
RecordFile read_record(const std::filesystem::path& file, const RecordHints& hints = {});

}  // namespace pilotis
