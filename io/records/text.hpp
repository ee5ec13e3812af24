// Small help with text, shared by the record formats.
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace pilotis {

// One line of a file, without its line ending; a view into the content.
struct TextLine {
  int number = 0;  // counted from 1
  std::string_view text;
};

// Walks a text line by line. Lines end in LF, CR LF or CR. An end of file after the last line ending makes no further
// line; a DOS end-of-file mark (control-Z) ends the text.
class LineCursor {
 public:
  explicit LineCursor(std::string_view content);

  bool at_end() const { return at_end_; }
  const TextLine& line() const { return line_; }  // where it stands; at the end, the last line
  void advance();                                 // not at the end
  std::vector<TextLine> take(std::size_t count);  // this line and those after it, at most so many, passing over them
  std::size_t bytes_left() const;                 // from the current line on

 private:
  std::string_view content_;
  std::size_t next_ = 0;                 // where the line after the current one begins
  std::size_t feed_ = 0, carriage_ = 0;  // the first LF and the first CR from there on, or the end
  TextLine line_;
  bool at_end_ = false;
};

// All lines at once.
std::vector<TextLine> lines_of(std::string_view content);

constexpr bool is_blank(char c) { return c == ' ' || c == '\t'; }
std::string_view stripped(std::string_view text);             // without blanks and tabs at both ends
std::string_view without_end_blanks(std::string_view text);   // without those at the end
std::string lower_case(std::string_view text);                // ASCII letters only
bool holds(std::string_view text, std::string_view phrase);   // ignoring the case of ASCII letters
bool begins(std::string_view text, std::string_view phrase);  // the same
std::string_view first_line_of(std::string_view content);     // without its line ending and blanks at both ends

// What stands behind the first `phrase` (case does not matter); empty when it is not there.
std::string_view text_after(std::string_view text, std::string_view phrase);
// The first number in a text, as in "3920(gal)/6182761" or "AT .020SEC."; empty when there is none.
std::string_view first_number_in(std::string_view text);

// Pieces between blanks and tabs; never empty ones.
std::vector<std::string_view> words_of(std::string_view text);

// "file:line", for messages.
std::string at_line(const std::string& file, int line);
// Found text in quotes, shortened and without control characters, for messages.
std::string in_quotes(std::string_view text);

}  // namespace pilotis
