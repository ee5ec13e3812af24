#include "io/records/file.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cerrno>
#include <cstdint>
#include <cstring>
#include <fstream>

#include "core/error.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

constexpr std::uintmax_t most_bytes = std::uintmax_t{1}
                                      << 30;  // hours of shaking at 1000 samples a second are far less
constexpr const char* allowed = "the path of a text file with one accelerogram is needed";

void require_ordinary_file(const fs::path& file) {
  std::error_code trouble;
  const fs::file_status status = fs::status(file, trouble);
  if (trouble == std::errc::permission_denied)
    throw outside_error(file.string(), "this program may not look at the file", "give it permission to read");
  if (status.type() == fs::file_type::not_found) throw input_error(file.string(), "there is no such file", allowed);
  if (trouble) throw outside_error(file.string(), "it cannot be looked at: " + trouble.message(), "check the disk");
  if (fs::is_directory(status)) throw input_error(file.string(), "this is a folder, not a file", allowed);
  if (!fs::is_regular_file(status)) throw input_error(file.string(), "this is not an ordinary file", allowed);
}

void require_sensible_size(const fs::path& file) {
  std::error_code trouble;
  const std::uintmax_t bytes = fs::file_size(file, trouble);
  if (trouble) throw outside_error(file.string(), "it cannot be looked at: " + trouble.message(), "check the disk");
  if (bytes == 0)
    throw input_error(file.string(), "the file is empty (0 bytes)", "a record needs at least two samples");
  if (bytes > most_bytes)
    throw input_error(file.string(), fmt::format("the file has {} bytes", bytes),
                      fmt::format("a record of one component has at most {}", most_bytes));
}

constexpr std::string_view controls_of_text = "\t\n\r\f\v";

bool is_control(char c) {
  return static_cast<unsigned char>(c) < ' ' && controls_of_text.find(c) == std::string_view::npos;
}

// Written without branches, so that the compiler takes many bytes at a time.
bool has_controls(std::string_view text) {
  unsigned char found = 0;
  for (const char c : text) {
    const auto byte = static_cast<unsigned char>(c);
    found |= static_cast<unsigned char>((byte < 9) | ((byte > 13) & (byte < 32)));
  }
  return found != 0;
}

}  // namespace

std::string content_of(const fs::path& file) {
  require_ordinary_file(file);
  require_sensible_size(file);
  errno = 0;
  std::ifstream stream(file, std::ios::binary);
  if (!stream)
    throw outside_error(file.string(), fmt::format("it cannot be opened: {}", std::strerror(errno)),
                        "check that this program may read it");
  std::string content(fs::file_size(file), '\0');
  stream.read(content.data(), static_cast<std::streamsize>(content.size()));
  if (stream.bad()) throw outside_error(file.string(), "reading it failed", "check the disk");
  content.resize(static_cast<std::size_t>(stream.gcount()));
  return content;
}

std::string_view text_of(std::string_view content, const std::string& where) {
  constexpr std::string_view padding("\x1A\0 \t\r\n", 6);
  if (content.starts_with("\xFF\xFE") || content.starts_with("\xFE\xFF"))
    throw input_error(where, "found UTF-16 text", "save the file as UTF-8 or plain ASCII text");
  const std::size_t end = std::min(content.find(padding.front()), content.size());
  const std::string_view text = content.substr(0, end);
  const auto line_of = [&](std::size_t offset) {
    return fmt::format("{}:{}", where,
                       1 + std::count(content.begin(), content.begin() + static_cast<long>(offset), '\n'));
  };
  if (has_controls(text)) {
    const auto found = static_cast<std::size_t>(std::find_if(text.begin(), text.end(), is_control) - text.begin());
    throw input_error(line_of(found),
                      fmt::format("found binary content (byte 0x{:02X} at offset {})",
                                  static_cast<unsigned char>(text[found]), found),
                      "a record must be text: export it as two columns, time and acceleration, with their units");
  }
  if (content.find_first_not_of(padding, end) != std::string_view::npos)
    throw input_error(line_of(end), "found more text behind an end-of-file mark (control-Z)",
                      "remove the mark, or what stands behind it");
  return text;
}

}  // namespace pilotis
