#include "apps/write_file.hpp"

#include <fmt/format.h>
#include <unistd.h>

#include <cerrno>
#include <cstring>
#include <fstream>

#include "core/error.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

void require_folder(const fs::path& file) {
  const fs::path folder = file.has_parent_path() ? file.parent_path() : fs::path(".");
  std::error_code ignored;
  if (!file.has_filename() || fs::is_directory(file, ignored))
    throw input_error(file.string(), "this is a folder, not a file", "the name of a file to write is needed");
  if (!fs::is_directory(folder, ignored))
    throw input_error(file.string(), fmt::format("there is no folder \"{}\"", folder.string()), "make it first");
}

[[noreturn]] void give_up(const fs::path& temporary, const fs::path& file, const std::string& reason) {
  std::error_code ignored;
  fs::remove(temporary, ignored);
  throw outside_error(file.string(), "it cannot be written: " + reason, "check space and permission");
}

}  // namespace

void write_whole(const fs::path& file, std::string_view content) {
  require_folder(file);
  const fs::path temporary = fmt::format("{}.{}.part", file.string(), getpid());
  errno = 0;
  std::ofstream stream(temporary, std::ios::binary | std::ios::trunc);
  stream.write(content.data(), static_cast<std::streamsize>(content.size()));
  stream.close();
  if (!stream) give_up(temporary, file, std::strerror(errno));
  std::error_code trouble;
  fs::rename(temporary, file, trouble);
  if (trouble) give_up(temporary, file, trouble.message());
}

}  // namespace pilotis
