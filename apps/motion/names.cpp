#include "apps/motion/names.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <filesystem>

namespace pilotis {

std::vector<std::string> shown_names(const std::vector<RecordNumbers>& records) {
  const auto folder_of = [](const RecordNumbers& record) { return std::filesystem::path(record.file).parent_path(); };
  const bool one_folder = std::all_of(records.begin(), records.end(), [&](const RecordNumbers& record) {
    return folder_of(record) == folder_of(records.front());
  });
  std::vector<std::string> names;
  for (const RecordNumbers& record : records) {
    const std::string file = one_folder ? std::filesystem::path(record.file).filename().string() : record.file;
    names.push_back(record.component.empty() ? file : file + " " + record.component);
  }
  return names;
}

ShownUnit screen_unit(Dimension dimension) {
  if (dimension == Dimension::acceleration) return {standard_gravity, "g"};
  return {1, std::string(si_unit(dimension))};
}

std::string percent_text(double ratio) { return fmt::format("{:g} %", 100 * ratio); }

}  // namespace pilotis
