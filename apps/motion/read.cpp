#include "apps/motion/read.hpp"

#include <filesystem>
#include <set>

#include "core/error.hpp"
#include "io/file_pattern.hpp"
#include "io/records/components.hpp"

namespace pilotis {

std::vector<ReadComponent> components_of(const std::string& file, const RecordHints& hints) {
  FileOfRecords read = read_record_file(file, hints);
  if (hints.component) read.components = {chosen_component(read, hints.component, file)};
  std::vector<ReadComponent> components;
  for (RecordComponent& one : read.components) {
    std::vector<std::string> notes = components.empty() ? read.notes : std::vector<std::string>{};
    notes.insert(notes.end(), one.notes.begin(), one.notes.end());
    // The only component of a file goes by the file's name.
    const std::string name = read.components.size() > 1 ? component_label(one) : "";
    components.push_back({name, read.format, one.unit, std::move(notes), std::move(one.record)});
  }
  return components;
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
