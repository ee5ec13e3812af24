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

// Lines end in LF, CR LF or CR. An end of file after the last line ending makes no further line; a DOS end-of-file mark
// (control-Z) ends the text.
std::vector<TextLine> lines_of(std::string_view content);

std::string_view stripped(std::string_view text);            // without blanks and tabs at both ends
std::string lower_case(std::string_view text);               // ASCII letters only
bool holds(std::string_view text, std::string_view phrase);  // ignoring the case of ASCII letters

// Pieces between blanks and tabs; never empty ones.
std::vector<std::string_view> words_of(std::string_view text);

// "file:line", for messages.
std::string at_line(const std::string& file, int line);
// Found text in quotes, shortened and without control characters, for messages.
std::string in_quotes(std::string_view text);

}  // namespace pilotis
