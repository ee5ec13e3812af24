#include "io/study/motion_files.hpp"

#include <fmt/format.h>
#include <glob.h>

#include <algorithm>

#include "io/records/file.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

bool is_pattern(const std::string& text) { return text.find_first_of("*?[") != std::string::npos; }

// The folder's own name is never a pattern.
std::string escaped(const std::string& folder) {
  std::string text;
  for (const char c : folder) {
    if (std::string_view("*?[]\\").find(c) != std::string_view::npos) text += '\\';
    text += c;
  }
  return text;
}

std::vector<fs::path> matches(const std::string& pattern, const ValueReader& value) {
  glob_t found{};
  const int status = glob(pattern.c_str(), 0, nullptr, &found);
  std::vector<fs::path> files;
  for (std::size_t i = 0; status == 0 && i < found.gl_pathc; ++i)
    if (std::error_code ignored; !fs::is_directory(found.gl_pathv[i], ignored)) files.emplace_back(found.gl_pathv[i]);
  globfree(&found);
  if (status != 0 && status != GLOB_NOMATCH)
    throw outside_error(value.where(), fmt::format("the folder of \"{}\" cannot be searched", value.node().text),
                        "check that this program may read it");
  std::sort(files.begin(), files.end());
  return files;
}

}  // namespace

std::vector<fs::path> files_named(const ValueReader& value, const fs::path& folder) {
  const std::string text = value.text();
  const bool absolute = fs::path(text).is_absolute();
  // The name as it stands comes first: a file may really be called "a[1].csv".
  const fs::path plain = absolute || folder.empty() ? fs::path(text) : folder / text;
  if (std::error_code ignored; fs::exists(plain, ignored)) return {plain};
  const std::string relative_to = fmt::format("{} are relative to {}", is_pattern(text) ? "patterns" : "paths",
                                              folder.empty() ? "the current folder" : folder.string());
  if (!is_pattern(text)) throw value.wrong(fmt::format("there is no file \"{}\"", text), relative_to);
  const std::string prefix = absolute || folder.empty() ? std::string() : fmt::format("{}/", escaped(folder.string()));
  std::vector<fs::path> files = matches(prefix + text, value);
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
