#include "apps/text_table.hpp"

#include <algorithm>
#include <sstream>
#include <stdexcept>

namespace pilotis {

namespace {

// Characters on the screen: bytes of UTF-8 that continue a character do not count.
std::size_t width_of(const std::string& text) {
  return static_cast<std::size_t>(
      std::count_if(text.begin(), text.end(), [](char c) { return (static_cast<unsigned char>(c) & 0xC0) != 0x80; }));
}

std::string padded(const std::string& text, std::size_t width, TextTable::Align align) {
  const std::string blanks(width - std::min(width, width_of(text)), ' ');
  return align == TextTable::Align::left ? text + blanks : blanks + text;
}

// Row by row; shorter titles stand at the bottom.
std::vector<std::vector<std::string>> title_lines(const std::vector<TextTable::Column>& columns) {
  std::size_t rows = 1;
  for (const TextTable::Column& column : columns)
    rows = std::max(rows, static_cast<std::size_t>(std::count(column.title.begin(), column.title.end(), '\n')) + 1);
  std::vector<std::vector<std::string>> lines(rows, std::vector<std::string>(columns.size()));
  for (std::size_t i = 0; i < columns.size(); ++i) {
    std::istringstream title(columns[i].title);
    const auto own = static_cast<std::size_t>(std::count(columns[i].title.begin(), columns[i].title.end(), '\n')) + 1;
    for (std::size_t row = rows - own; row < rows; ++row) std::getline(title, lines[row][i]);
  }
  return lines;
}

}  // namespace

void TextTable::add_row(std::vector<std::string> cells) {
  if (cells.size() != columns_.size()) throw std::logic_error("a row needs one cell for each column");
  rows_.push_back(std::move(cells));
}

std::string TextTable::text() const {
  std::vector<std::vector<std::string>> lines = title_lines(columns_);
  lines.insert(lines.end(), rows_.begin(), rows_.end());
  std::vector<std::size_t> widths(columns_.size());
  for (const auto& line : lines)
    for (std::size_t i = 0; i < line.size(); ++i) widths[i] = std::max(widths[i], width_of(line[i]));
  std::string text;
  for (const auto& line : lines) {
    std::string row;
    for (std::size_t i = 0; i < line.size(); ++i) row += "  " + padded(line[i], widths[i], columns_[i].align);
    row.erase(row.find_last_not_of(' ') + 1);
    text += row + "\n";
  }
  return text;
}

}  // namespace pilotis
