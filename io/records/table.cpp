#include "io/records/table.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr std::string_view comment_marks = "#%*|/";
constexpr std::string_view separators = " \t,;";

bool is_comment_mark(char c) { return c == '#' || c == '%' || c == '*' || c == '|' || c == '/'; }

// The first row, with room for those after it as far as one can tell.
void begin_rows(const LineCursor& cursor, std::vector<TextLine>& rows) {
  constexpr std::size_t most = 1'000'000;  // of an unusual file, that room is not taken at once
  rows.reserve(std::min(most, 2 + cursor.bytes_left() / (cursor.line().text.size() + 1)));
  rows.push_back(cursor.line());
}

// NaN and overflow count: such a line is a row, and a bad one.
bool is_numeric(std::string_view token, char decimal_sign = '.') {
  return parse_number(token, decimal_sign).kind != ParsedNumber::Kind::not_a_number;
}

bool starts_with_number(std::string_view line) {
  const std::size_t begin = line.find_first_not_of(separators);
  if (begin == std::string_view::npos) return false;
  return is_numeric(line.substr(begin, line.find_first_of(separators, begin) - begin));
}

std::string_view without_marks(std::string_view comment) {
  const std::size_t begin = comment.find_first_not_of(comment_marks);
  return begin == std::string_view::npos ? std::string_view{} : stripped(comment.substr(begin));
}

bool may_be_decimal(char separator, char sign) { return sign == '.' || separator == ';' || separator == '\t'; }

// All cells are numbers, or blank between separators that can leave a blank.
bool splits_into_numbers(std::string_view line, char separator) {
  for (std::string_view cell : cells_of(line, separator)) {
    const bool blank_cell = cell.empty() && separator != '\t';
    const bool with_comma = may_be_decimal(separator, ',') && is_numeric(cell, ',');
    if (!blank_cell && !is_numeric(cell) && !with_comma) return false;
  }
  return true;
}

char separator_of(std::string_view line) {
  const std::string_view inside = stripped(line);
  for (char candidate : {';', '\t', ',', ' '})
    if (inside.find(candidate) != std::string_view::npos && splits_into_numbers(line, candidate)) return candidate;
  for (char candidate : {';', ',', '\t'})
    if (inside.find(candidate) != std::string_view::npos) return candidate;
  return ' ';
}

// The decimal sign of the whole file: that of the first cell that has one.
char decimal_sign_of(const std::vector<TextLine>& rows, char separator) {
  if (!may_be_decimal(separator, ',')) return '.';
  for (const TextLine& row : rows) {
    const std::size_t found = row.text.find_first_of(".,");
    if (found != std::string_view::npos) return row.text[found];
  }
  return '.';
}

std::string_view unquoted(std::string_view cell) {
  if (cell.size() >= 2 && cell.front() == '"' && cell.back() == '"') cell = stripped(cell.substr(1, cell.size() - 2));
  return cell;
}

void require_cells(const std::vector<std::string_view>& cells, const TextLine& row, std::size_t columns,
                   const std::string& file) {
  const std::string where = at_line(file, row.number);
  if (stripped(row.text).empty())
    throw input_error(where, "found a blank line between the samples", "every row must hold its sample");
  for (std::size_t i = 0; i < cells.size(); ++i)
    if (cells[i].empty())
      throw input_error(where, fmt::format("cell {} of {} is blank in {}", i + 1, cells.size(), in_quotes(row.text)),
                        "every cell must hold a number; a row must not end with a separator");
  if (cells.size() != columns)
    throw input_error(where, fmt::format("found {} value(s) in {}", cells.size(), in_quotes(row.text)),
                      fmt::format("every row must have as many as the first, {}", columns));
}

void widen(std::string_view cell, Precision& finest) {
  const Precision here = printed_precision(cell);
  finest.decimals = std::max(finest.decimals, here.decimals);
  finest.digits = std::max(finest.digits, here.digits);
}

// Takes the number at the front of `text` off, with the blanks around it and the separator behind it unless it is the
// `last` of its row. False when anything is unusual.
bool take_cell(std::string_view& text, char separator, bool last, double& value, std::string_view& cell) {
  const auto passed = [separator](char c) { return c == ' ' || (c == '\t' && separator == ' '); };
  const char *begin = text.data(), *end = begin + text.size();
  while (begin != end && passed(*begin)) ++begin;
  const auto [rest, error] = std::from_chars(begin, end, value);
  if (error != std::errc{} || !std::isfinite(value)) return false;
  cell = std::string_view(begin, static_cast<std::size_t>(rest - begin));
  const char* next = rest;
  while (next != end && passed(*next)) ++next;
  if (last) return next == end;
  if (next == end || (separator == ' ' ? next == rest : *next++ != separator)) return false;
  text = std::string_view(next, static_cast<std::size_t>(end - next));
  return true;
}

// The usual row: as many plain numbers as there are columns. False, with nothing appended, for any other.
bool append_plainly(std::string_view line, std::optional<std::size_t> times, Table& table) {
  const std::size_t before = table.values.size();
  for (std::size_t i = 0; i < table.columns; ++i) {
    double value = 0;
    std::string_view cell;
    if (!take_cell(line, table.separator, i + 1 == table.columns, value, cell)) {
      table.values.resize(before);
      return false;
    }
    table.values.push_back(value);
    if (times == i) widen(cell, table.finest);
  }
  return true;
}

// Other notations of numbers; says what is wrong with a bad row.
void append_carefully(const TextLine& row, std::optional<std::size_t> times, char decimal_sign, const std::string& file,
                      Table& table) {
  const std::vector<std::string_view> cells = cells_of(row.text, table.separator);
  require_cells(cells, row, table.columns, file);
  const std::string where = at_line(file, row.number);
  for (std::size_t i = 0; i < cells.size(); ++i) {
    table.values.push_back(require_number(cells[i], where, decimal_sign));
    if (times == i) widen(cells[i], table.finest);
  }
}

}  // namespace

std::vector<std::string_view> cells_of(std::string_view line, char separator) {
  if (separator == ' ') return words_of(line);
  std::vector<std::string_view> cells;
  for (std::size_t begin = 0; begin <= line.size();) {
    const std::size_t end = std::min(line.find(separator, begin), line.size());
    cells.push_back(unquoted(stripped(line.substr(begin, end - begin))));
    begin = end + 1;
  }
  return cells;
}

PlainText sorted_lines(std::string_view content, const std::string& file) {
  PlainText sorted;
  LineCursor cursor(content);
  for (; !cursor.at_end(); cursor.advance()) {
    const TextLine& line = cursor.line();
    const std::string_view text = stripped(line.text);
    if (!text.empty() && is_comment_mark(text.front()))
      sorted.comments.push_back({line.number, without_marks(text)});
    else if (!sorted.rows.empty())
      sorted.rows.push_back(line);
    else if (starts_with_number(text))
      begin_rows(cursor, sorted.rows);
    else if (!text.empty())
      sorted.headings.push_back({line.number, text});
  }
  while (!sorted.rows.empty() && stripped(sorted.rows.back().text).empty()) sorted.rows.pop_back();
  if (!sorted.rows.empty()) return sorted;
  if (!sorted.headings.empty())
    throw input_error(
        at_line(file, sorted.headings.front().number),
        fmt::format("found {} and no row of numbers in the whole file", in_quotes(sorted.headings[0].text)),
        "a record in plain text is rows of numbers: samples, or time and sample");
  throw input_error(
      at_line(file, std::max(1, cursor.line().number)),
      fmt::format("the file ends without a number: {} comment line(s) and nothing else", sorted.comments.size()),
      "a record needs at least two samples");
}

std::size_t columns_in(const TextLine& row) { return cells_of(row.text, separator_of(row.text)).size(); }

Table read_table(const std::vector<TextLine>& rows, std::optional<std::size_t> times, const std::string& file) {
  Table table;
  table.separator = separator_of(rows.front().text);
  table.columns = columns_in(rows.front());
  table.finest = {-400, 0};
  table.values.reserve(rows.size() * table.columns);
  table.lines.reserve(rows.size());
  const char decimal_sign = decimal_sign_of(rows, table.separator);
  for (const TextLine& row : rows) {
    if (decimal_sign != '.' || !append_plainly(row.text, times, table))
      append_carefully(row, times, decimal_sign, file, table);
    table.lines.push_back(row.number);
  }
  return table;
}

}  // namespace pilotis
