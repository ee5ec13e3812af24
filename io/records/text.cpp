#include "io/records/text.hpp"

#include <fmt/format.h>

#include <algorithm>

namespace pilotis {

namespace {

constexpr char dos_end_of_file = 0x1A;

char lower(char c) { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; }

bool same_letter(char a, char b) { return lower(a) == lower(b); }

bool is_digit(char c) { return c >= '0' && c <= '9'; }

std::size_t first_not_digit(std::string_view text, std::size_t begin) {
  while (begin < text.size() && is_digit(text[begin])) ++begin;
  return begin;
}

// End of the number that begins at `begin`; `begin` itself when none does.
std::size_t number_end(std::string_view text, std::size_t begin) {
  std::size_t at = begin;
  if (at < text.size() && (text[at] == '+' || text[at] == '-')) ++at;
  std::size_t digits_end = first_not_digit(text, at), digits = digits_end - at;
  if (digits_end < text.size() && text[digits_end] == '.') {
    const std::size_t fraction = digits_end + 1;
    digits_end = first_not_digit(text, fraction);
    digits += digits_end - fraction;
  }
  if (digits == 0) return begin;
  if (digits_end == text.size() || std::string_view("eEdD").find(text[digits_end]) == std::string_view::npos)
    return digits_end;
  std::size_t exponent = digits_end + 1;
  if (exponent < text.size() && (text[exponent] == '+' || text[exponent] == '-')) ++exponent;
  const std::size_t end = first_not_digit(text, exponent);
  return end == exponent ? digits_end : end;
}

}  // namespace

LineCursor::LineCursor(std::string_view content) : content_(content.substr(0, content.find(dos_end_of_file))) {
  feed_ = std::min(content_.find('\n'), content_.size());
  carriage_ = std::min(content_.find('\r'), content_.size());
  advance();
}

void LineCursor::advance() {
  if (next_ >= content_.size()) {
    at_end_ = true;
    return;
  }
  const std::size_t begin = next_, end = std::min(feed_, carriage_);
  line_ = {line_.number + 1, content_.substr(begin, end - begin)};
  next_ = end + (content_.substr(end, 2) == "\r\n" ? 2 : 1);
  if (next_ > content_.size()) next_ = content_.size();
  if (feed_ < next_) feed_ = std::min(content_.find('\n', next_), content_.size());
  if (carriage_ < next_) carriage_ = std::min(content_.find('\r', next_), content_.size());
}

std::vector<TextLine> LineCursor::take(std::size_t count) {
  std::vector<TextLine> lines;
  for (; lines.size() < count && !at_end_; advance()) lines.push_back(line_);
  return lines;
}

std::size_t LineCursor::bytes_left() const {
  if (at_end_) return 0;
  return static_cast<std::size_t>(content_.data() + content_.size() - line_.text.data());
}

std::vector<TextLine> lines_of(std::string_view content) {
  std::vector<TextLine> lines;
  for (LineCursor cursor(content); !cursor.at_end(); cursor.advance()) lines.push_back(cursor.line());
  return lines;
}

// Loops of its own: the library's searches for one of several characters are slow on short texts.
std::string_view stripped(std::string_view text) {
  while (!text.empty() && is_blank(text.front())) text.remove_prefix(1);
  return without_end_blanks(text);
}

std::string_view without_end_blanks(std::string_view text) {
  while (!text.empty() && is_blank(text.back())) text.remove_suffix(1);
  return text;
}

std::string lower_case(std::string_view text) {
  std::string result(text);
  std::transform(result.begin(), result.end(), result.begin(), lower);
  return result;
}

bool holds(std::string_view text, std::string_view phrase) {
  return std::search(text.begin(), text.end(), phrase.begin(), phrase.end(), same_letter) != text.end();
}

bool begins(std::string_view text, std::string_view phrase) {
  return text.size() >= phrase.size() && std::equal(phrase.begin(), phrase.end(), text.begin(), same_letter);
}

std::string_view first_line_of(std::string_view content) {
  return stripped(content.substr(0, content.find_first_of("\r\n")));
}

std::string_view text_after(std::string_view text, std::string_view phrase) {
  const auto found = std::search(text.begin(), text.end(), phrase.begin(), phrase.end(), same_letter);
  if (found == text.end()) return {};
  return text.substr(static_cast<std::size_t>(found - text.begin()) + phrase.size());
}

std::string_view first_number_in(std::string_view text) {
  for (std::size_t begin = 0; begin < text.size(); ++begin)
    if (const std::size_t end = number_end(text, begin); end > begin) return text.substr(begin, end - begin);
  return {};
}

std::vector<std::string_view> words_of(std::string_view text) {
  std::vector<std::string_view> words;
  for (std::size_t at = 0; at < text.size();) {
    while (at < text.size() && is_blank(text[at])) ++at;
    const std::size_t begin = at;
    while (at < text.size() && !is_blank(text[at])) ++at;
    if (at > begin) words.push_back(text.substr(begin, at - begin));
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
