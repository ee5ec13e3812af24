// Rows of numbers in plain text: any separator, decimal point or comma, every row with the same number of cells.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "io/records/number.hpp"
#include "io/records/text.hpp"

namespace pilotis {

// A plain text file sorted into what it says and what it lists.
struct PlainText {
  std::vector<TextLine> comments;  // without their marks, anywhere in the file
  std::vector<TextLine> headings;  // lines of text above the first row that are no comments
  std::vector<TextLine> rows;      // everything from the first row on; blank lines at the end left out
};

// Comments start with # % * | or /. Throws Error (input) when there are no rows.
PlainText sorted_lines(std::string_view content, const std::string& file);

struct Table {
  std::size_t columns = 0;
  char separator = ' ';        // ; , tab, or a blank for blanks
  std::vector<double> values;  // [row][column]
  std::vector<int> lines;      // [row]
  Precision finest;            // of the column of times: most decimals and most digits of any row

  std::size_t rows() const { return lines.size(); }
  double at(std::size_t row, std::size_t column) const { return values[row * columns + column]; }
};

// How many cells a row has, by the separator it shows.
std::size_t columns_in(const TextLine& row);

// Throws Error (input), naming line and text, for a cell that is blank, no number or not finite, and for a row with
// more or fewer cells than the first. `times` is the column of times, where there is one.
Table read_table(const std::vector<TextLine>& rows, std::optional<std::size_t> times, const std::string& file);

// The cells of a line, blanks and quotes around them removed.
std::vector<std::string_view> cells_of(std::string_view line, char separator);

}  // namespace pilotis
