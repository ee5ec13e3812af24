#include "io/study/motion_files.hpp"

#include <fmt/format.h>

#include "io/file_pattern.hpp"
#include "io/records/file.hpp"

namespace pilotis {

namespace fs = std::filesystem;

std::vector<fs::path> files_named(const ValueReader& value, const fs::path& folder) {
  const std::string text = value.text();
  const bool absolute = fs::path(text).is_absolute();
  // The name as it stands comes first: a file may really be called "a[1].csv".
  const fs::path plain = absolute || folder.empty() ? fs::path(text) : folder / text;
  if (std::error_code ignored; fs::exists(plain, ignored)) return {plain};
  const std::string relative_to = fmt::format("{} are relative to {}", is_file_pattern(text) ? "patterns" : "paths",
                                              folder.empty() ? "the current folder" : folder.string());
  if (!is_file_pattern(text)) throw value.wrong(fmt::format("there is no file \"{}\"", text), relative_to);
  const std::string prefix =
      absolute || folder.empty() ? std::string() : fmt::format("{}/", without_pattern(folder.string()));
  std::vector<fs::path> files = files_matching(prefix + text, value.where());
  if (files.empty()) throw value.wrong(fmt::format("no file matches \"{}\"", text), relative_to);
  return files;
}

std::string read_whole(const fs::path& file, const std::string& wanted) {
  std::string content;
  try {
    content = content_of(file);
  } catch (const Error& error) {
    if (error.kind() == ErrorKind::input) throw input_error(error.where(), error.problem(), wanted);
    throw;
  }
  return content;
}

}  // namespace pilotis
