#include "io/records/text.hpp"

#include <fmt/format.h>

#include <algorithm>

namespace pilotis {

namespace {

constexpr std::string_view blanks = " \t";
constexpr char dos_end_of_file = 0x1A;

char lower(char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; }

// Length of the line ending at `content[end]`.
std::size_t ending_length(std::string_view content, std::size_t end) {
  return content.substr(end, 2) == "\r\n" ? 2 : 1;
}

}  // namespace

std::vector<TextLine> lines_of(std::string_view content) {
  content = content.substr(0, content.find(dos_end_of_file));
  std::vector<TextLine> lines;
  for (std::size_t begin = 0; begin < content.size();) {
    const std::size_t end = std::min(content.find_first_of("\r\n", begin), content.size());
    lines.push_back({static_cast<int>(lines.size()) + 1, content.substr(begin, end - begin)});
    begin = end == content.size() ? end : end + ending_length(content, end);
  }
  return lines;
}

std::string_view stripped(std::string_view text) {
  const std::size_t first = text.find_first_not_of(blanks);
  if (first == std::string_view::npos) return {};
  return text.substr(first, text.find_last_not_of(blanks) - first + 1);
}

std::string lower_case(std::string_view text) {
  std::string result(text);
  std::transform(result.begin(), result.end(), result.begin(), lower);
  return result;
}

bool holds(std::string_view text, std::string_view phrase) {
  const auto same = [](char a, char b) { return lower(a) == lower(b); };
  return std::search(text.begin(), text.end(), phrase.begin(), phrase.end(), same) != text.end();
}

std::vector<std::string_view> words_of(std::string_view text) {
  std::vector<std::string_view> words;
  for (std::size_t begin = text.find_first_not_of(blanks); begin != std::string_view::npos;) {
    const std::size_t end = std::min(text.find_first_of(blanks, begin), text.size());
    words.push_back(text.substr(begin, end - begin));
    begin = text.find_first_not_of(blanks, end);
  }
  return words;
}

std::string at_line(const std::string& file, int line) { return fmt::format("{}:{}", file, line); }

std::string in_quotes(std::string_view text) {
  constexpr std::size_t most = 60;
  std::string clean(text.substr(0, most));
  for (char& c : clean)
    if (static_cast<unsigned char>(c) < ' ' || c == 0x7F) c = '?';
  return fmt::format("\"{}{}\"", clean, text.size() > most ? "..." : "");
}

}  // namespace pilotis
