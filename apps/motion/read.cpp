#include "apps/motion/read.hpp"

#include <filesystem>
#include <set>

#include "core/error.hpp"
#include "io/file_pattern.hpp"

namespace pilotis {

std::vector<ReadComponent> components_of(const std::string& file, const RecordHints& hints) {
  RecordFile read = read_record(file, hints);
  return {{"", read.format, read.unit, std::move(read.notes), std::move(read.record)}};
}

std::vector<std::string> files_meant(const std::vector<std::string>& typed) {
  std::vector<std::string> files;
  std::set<std::string> known;
  const auto add = [&](const std::string& file) {
    if (known.insert(file).second) files.push_back(file);
  };
  for (const std::string& text : typed) {
    std::error_code ignored;
    std::vector<std::filesystem::path> matches;
    if (is_file_pattern(text) && !std::filesystem::exists(text, ignored)) matches = files_matching(text, text);
    for (const std::filesystem::path& match : matches) add(match.string());
    if (matches.empty()) add(text);
  }
  return files;
}

}  // namespace pilotis
