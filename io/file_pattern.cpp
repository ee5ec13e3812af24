#include "io/file_pattern.hpp"

#include <fmt/format.h>
#include <glob.h>

#include <algorithm>

#include "core/error.hpp"

namespace pilotis {

namespace fs = std::filesystem;

bool is_file_pattern(const std::string& text) { return text.find_first_of("*?[") != std::string::npos; }

std::string without_pattern(const std::string& text) {
  std::string escaped;
  for (const char c : text) {
    if (std::string_view("*?[]\\").find(c) != std::string_view::npos) escaped += '\\';
    escaped += c;
  }
  return escaped;
}

std::vector<fs::path> files_matching(const std::string& pattern, const std::string& where) {
  glob_t found{};
  const int status = glob(pattern.c_str(), 0, nullptr, &found);
  std::vector<fs::path> files;
  for (std::size_t i = 0; status == 0 && i < found.gl_pathc; ++i)
    if (std::error_code ignored; !fs::is_directory(found.gl_pathv[i], ignored)) files.emplace_back(found.gl_pathv[i]);
  globfree(&found);
  if (status != 0 && status != GLOB_NOMATCH)
    throw outside_error(where, fmt::format("the folder of \"{}\" cannot be searched", pattern),
                        "check that this program may read it");
  std::sort(files.begin(), files.end());
  return files;
}

}  // namespace pilotis
