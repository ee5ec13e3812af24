#include "io/records/body.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <charconv>

#include "core/error.hpp"
#include "io/records/number.hpp"

namespace pilotis {

namespace {

constexpr const char* whole_file = "the file must hold exactly as many values as its header says; was it cut off?";

// A field holds one number and blanks around it, else this says what is wrong.
double number_in_field(std::string_view field, const TextLine& row, const std::string& file) {
  const std::string where = at_line(file, row.number);
  const std::string_view inside = stripped(field);
  if (inside.empty())
    throw input_error(where, fmt::format("found a blank field in {}", in_quotes(row.text)),
                      "every column of a row must hold a number");
  return require_number(inside, where);
}

// The fields of a row one after the other: columns of a fixed width, or words.
class Fields {
 public:
  Fields(std::string_view line, const Columns& columns) : row_(without_end_blanks(line)), width_(columns.width) {
    skip_blanks();
  }
  bool at_end() const { return at_ >= row_.size(); }
  std::string_view next() {
    const std::size_t begin = at_;
    if (width_ > 0) return at_ += width_, row_.substr(begin, width_);
    while (at_ < row_.size() && !is_blank(row_[at_])) ++at_;
    const std::string_view word = row_.substr(begin, at_ - begin);
    skip_blanks();
    return word;
  }
  std::string_view row() const { return row_; }

 private:
  void skip_blanks() {
    while (width_ == 0 && at_ < row_.size() && is_blank(row_[at_])) ++at_;
  }
  std::string_view row_;
  std::size_t width_ = 0, at_ = 0;
};

bool ends_where_a_column_ends(std::string_view row, const Columns& columns) {
  return columns.width == 0 || (row.size() % columns.width == 0 && row.size() <= columns.per_row * columns.width);
}

// Each value of a row to `add`, the row being of numbers between blanks or in columns; false at the first unusual one.
template <class Add>
bool each_word(std::string_view row, Add add) {
  for (double value = 0; !row.empty(); add(value))
    if (!take_plainly(row, value)) return false;
  return true;
}
template <class Add>
bool each_field(std::string_view row, std::size_t width, Add add) {
  for (double value = 0; !row.empty(); add(value)) {
    if (!parse_plainly(row.substr(0, width), value)) return false;
    row.remove_prefix(width);
  }
  return true;
}

// Appends at most `most` values of a row and gives how many the row has; empty, with nothing appended, when there is
// anything unusual about it.
std::optional<std::size_t> append_plainly(std::string_view line, const Columns& columns, std::size_t most,
                                          std::vector<double>& values) {
  const std::string_view row = without_end_blanks(line);
  if (!ends_where_a_column_ends(row, columns)) return std::nullopt;
  const std::size_t before = values.size();
  std::size_t found = 0;
  const auto add = [&](double value) {
    if (found++ < most) values.push_back(value);
  };
  if (columns.width == 0 ? each_word(row, add) : each_field(row, columns.width, add)) return found;
  values.resize(before);
  return std::nullopt;
}

// The same for values between blanks that run together.
std::optional<std::size_t> append_glued(std::string_view line, const Columns& columns, std::size_t most,
                                        std::vector<double>& values) {
  if (columns.glued == 0) return std::nullopt;
  return append_plainly(line, {line.size(), columns.glued}, most, values);
}

// The same for a row with other notations of numbers; says what is wrong with a bad one.
std::size_t append_carefully(const TextLine& line, const Columns& columns, std::size_t most, const std::string& file,
                             std::vector<double>& values) {
  Fields fields(line.text, columns);
  if (!ends_where_a_column_ends(fields.row(), columns))
    throw input_error(
        at_line(file, line.number), fmt::format("found {} characters in {}", fields.row().size(), in_quotes(line.text)),
        fmt::format("a row must have at most {} values of {} characters each", columns.per_row, columns.width));
  std::size_t found = 0;
  for (; !fields.at_end(); ++found) {
    const double value = number_in_field(fields.next(), line, file);
    if (found < most) values.push_back(value);
  }
  return found;
}

std::size_t append_row(const TextLine& line, const Columns& columns, std::size_t most, const std::string& file,
                       std::vector<double>& values) {
  if (const auto found = append_plainly(line.text, columns, most, values)) return *found;
  if (const auto found = append_glued(line.text, columns, most, values)) return *found;
  return append_carefully(line, columns, most, file, values);
}

// No more room is asked for than the file can fill, whatever its header promises.
void require_possible(const LineCursor& cursor, const Columns& columns, const Promise& promise,
                      const std::string& file) {
  const std::size_t each = columns.width > 0 ? columns.width : 2;  // a digit and a blank or a line ending
  if (promise.values / 2 <= cursor.bytes_left() / each + 1) return;
  throw input_error(at_line(file, promise.line),
                    fmt::format("found {}, but only {} bytes follow", promise.text, cursor.bytes_left()), whole_file);
}

[[noreturn]] void refuse_short(std::size_t found, const Promise& promise, int line, const std::string& file) {
  throw input_error(
      at_line(file, line),
      fmt::format("the numbers end after {} values, but line {} promises {}", found, promise.line, promise.text),
      whole_file);
}

[[noreturn]] void refuse_short_row(std::size_t before, std::size_t found, const Columns& columns,
                                   const Promise& promise, const TextLine& row, const std::string& file) {
  throw input_error(at_line(file, row.number),
                    fmt::format("after {} values a row has only {}, {}, but line {} promises {}", before, found,
                                in_quotes(row.text), promise.line, promise.text),
                    fmt::format("every row but the last must have {}; was the file cut off?", columns.per_row));
}

void require_full_row(std::size_t found, const Columns& columns, const TextLine& row, const std::string& file) {
  if (found == columns.per_row) return;
  throw input_error(at_line(file, row.number), fmt::format("found {} value(s) in {}", found, in_quotes(row.text)),
                    fmt::format("every row must have {}", columns.per_row));
}

void refuse_missing(const Body& body, const Columns& columns, double missing, const std::string& file) {
  const auto found = std::find(body.values.begin(), body.values.end(), missing);
  if (found == body.values.end()) return;
  const auto index = static_cast<std::size_t>(found - body.values.begin());
  const int line = body.first_line + static_cast<int>(columns.per_row == 0 ? 0 : index / columns.per_row);
  throw input_error(at_line(file, line), fmt::format("value {} is {}, the mark of a missing one", index + 1, missing),
                    "every sample must be there");
}

// "8f10.6": the number of columns, one of the letters, the width, and the digits after the point.
std::size_t leading_count(std::string_view text, std::size_t& at) {
  std::size_t value = 0;
  const auto [end, error] = std::from_chars(text.data() + at, text.data() + text.size(), value);
  if (error != std::errc{}) return 0;
  at = static_cast<std::size_t>(end - text.data());
  return value;
}

constexpr std::size_t widest_row = 1000;  // characters; rows of archives have 80 to 160

}  // namespace

std::optional<Columns> columns_from(std::string_view descriptor) {
  std::string text = lower_case(stripped(descriptor));
  std::erase_if(text, [](char c) { return is_blank(c) || c == '(' || c == ')'; });
  if (text.starts_with("1p")) text.erase(0, 2);  // one digit before the point: of no matter to a reader
  std::size_t at = 0;
  Columns columns;
  columns.per_row = std::max<std::size_t>(leading_count(text, at), 1);
  if (at >= text.size() || std::string_view("fegi").find(text[at]) == std::string_view::npos) return std::nullopt;
  ++at;
  columns.width = leading_count(text, at);
  if (at < text.size() && text[at] == '.') columns.decimals = static_cast<int>(leading_count(text, ++at));
  const bool sensible = columns.width > 0 && columns.width <= widest_row && columns.per_row <= widest_row &&
                        columns.width * columns.per_row <= widest_row;
  return sensible ? std::optional(columns) : std::nullopt;
}

Promise promise_of(std::string_view token, int line, const std::string& file, std::size_t values_each) {
  std::size_t samples = 0;
  const auto [end, error] = std::from_chars(token.data(), token.data() + token.size(), samples);
  const bool whole = error == std::errc{} && end == token.data() + token.size();
  if (!whole || samples < 2)
    throw input_error(at_line(file, line), fmt::format("found {} as the number of samples", in_quotes(token)),
                      "a whole number of at least 2 is needed");
  return {samples <= SIZE_MAX / values_each ? samples * values_each : SIZE_MAX, line,
          fmt::format("{} samples", samples)};
}

Body read_body(LineCursor& cursor, const Columns& columns, const Promise& promise, const std::string& file,
               std::optional<double> missing) {
  require_possible(cursor, columns, promise, file);
  Body body;
  body.first_line = cursor.line().number;
  body.values.reserve(promise.values);
  while (body.values.size() < promise.values) {
    const std::size_t before = body.values.size(), wanted = promise.values - before;
    if (cursor.at_end()) refuse_short(before, promise, cursor.line().number, file);
    std::optional<std::size_t> found = append_plainly(cursor.line().text, columns, wanted, body.values);
    if (!found) found = append_glued(cursor.line().text, columns, wanted, body.values);
    if (!found && before > 0 && !is_row(cursor.line().text, columns))
      refuse_short(before, promise, cursor.line().number, file);
    if (!found) found = append_carefully(cursor.line(), columns, wanted, file, body.values);
    if (*found < wanted && columns.per_row > *found)
      refuse_short_row(before, *found, columns, promise, cursor.line(), file);
    if (*found > wanted) body.surplus = *found - wanted;
    body.last_line = cursor.line().number;
    cursor.advance();
  }
  if (missing) refuse_missing(body, columns, *missing, file);
  return body;
}

std::vector<double> read_rows(LineCursor& cursor, const Columns& columns, const std::string& file) {
  std::vector<double> values;
  int blank_line = 0;
  for (; !cursor.at_end(); cursor.advance()) {
    if (stripped(cursor.line().text).empty()) {
      if (blank_line == 0) blank_line = cursor.line().number;
      continue;
    }
    if (blank_line != 0)
      throw input_error(at_line(file, blank_line), "found a blank line between the rows of numbers",
                        "every row must hold its samples");
    const std::size_t found = append_row(cursor.line(), columns, columns.per_row, file, values);
    require_full_row(found, columns, cursor.line(), file);
  }
  return values;
}

void refuse_surplus(const Body& body, const LineCursor& cursor, const Columns& columns, const Promise& promise,
                    const std::string& file) {
  const bool more = body.surplus > 0 || (!cursor.at_end() && is_row(cursor.line().text, columns));
  if (!more) return;
  throw input_error(at_line(file, body.surplus > 0 ? body.last_line : cursor.line().number),
                    fmt::format("more numbers follow, but line {} promises {}", promise.line, promise.text),
                    "the file must hold exactly as many values as its header says");
}

bool is_row(std::string_view line, const Columns& columns) {
  Fields fields(line, columns);
  return !fields.at_end() && parse_number(stripped(fields.next())).kind != ParsedNumber::Kind::not_a_number;
}

std::vector<std::optional<double>> header_numbers(LineCursor& cursor, const Columns& columns, std::size_t count,
                                                  const std::string& file) {
  std::vector<std::optional<double>> numbers;
  for (; numbers.size() < count; cursor.advance()) {
    if (cursor.at_end())
      throw input_error(at_line(file, cursor.line().number),
                        fmt::format("the file ends after {} of {} numbers of its header", numbers.size(), count),
                        "the whole header is needed; was the file cut off?");
    const TextLine& row = cursor.line();
    const std::size_t fields = std::min(columns.per_row, count - numbers.size());
    for (std::size_t i = 0; i < fields; ++i) {
      const std::size_t begin = std::min(i * columns.width, row.text.size());
      const std::string_view field = stripped(row.text.substr(begin, columns.width));
      if (field.empty())
        numbers.emplace_back();
      else
        numbers.emplace_back(require_number(field, at_line(file, row.number)));
    }
  }
  return numbers;
}

std::vector<double> column_of(const std::vector<double>& values, std::size_t columns, std::size_t first) {
  std::vector<double> chosen;
  chosen.reserve(values.size() / columns);
  for (std::size_t i = first; i < values.size(); i += columns) chosen.push_back(values[i]);
  return chosen;
}

}  // namespace pilotis
