// A plain table for the screen: columns aligned by spaces.
#pragma once

#include <string>
#include <vector>

namespace pilotis {

class TextTable {
 public:
  enum class Align { left, right };
  struct Column {
    std::string title;  // of several lines where it has line breaks
    Align align = Align::right;
  };

  explicit TextTable(std::vector<Column> columns) : columns_(std::move(columns)) {}

  // One cell for each column; throws std::logic_error otherwise.
  void add_row(std::vector<std::string> cells);

  // Title lines and rows, each indented by two spaces and ended by a newline, without blanks at line ends.
  std::string text() const;

 private:
  std::vector<Column> columns_;
  std::vector<std::vector<std::string>> rows_;
};

}  // namespace pilotis
