#include "io/records/smc.hpp"

#include <fmt/format.h>

#include <array>
#include <cmath>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/uneven.hpp"

namespace pilotis {

namespace {

constexpr std::size_t text_lines = 11;
constexpr Columns integer_columns{8, 10}, real_columns{5, 15};
constexpr double missing_integer = -32768, missing_real = 0.17e39;

// What a file holds, by its first line.
struct Quantity {
  std::string_view begins_with, name;
  bool is_acceleration;
};
constexpr std::array<Quantity, 7> quantities{{{"0 unknown", "an unknown quantity", true},
                                              {"1 uncorrected accelerogram", "an accelerogram", true},
                                              {"2 corrected accelerogram", "an accelerogram", true},
                                              {"3 velocity", "the velocity of the ground", false},
                                              {"4 displacement", "the displacement of the ground", false},
                                              {"5 response spectr", "response spectra", false},
                                              {"6 fourier", "Fourier spectra", false}}};

const Quantity* quantity_of(std::string_view content) {
  for (const Quantity& quantity : quantities)
    if (begins(first_line_of(content), quantity.begins_with)) return &quantity;
  return nullptr;
}

struct Header {
  std::vector<TextLine> text;
  std::vector<std::optional<double>> integers, reals;  // missing ones are empty
  int integers_line = 0, reals_line = 0;
};

void forget_missing(std::vector<std::optional<double>>& numbers, double mark) {
  for (auto& number : numbers)
    if (number && std::abs(*number - mark) <= 1e-6 * std::abs(mark)) number.reset();
}

Header header_of(LineCursor& cursor, const std::string& file) {
  Header header;
  header.text = cursor.take(text_lines);
  header.integers_line = cursor.line().number;
  header.integers = header_numbers(cursor, integer_columns, 48, file);
  header.reals_line = cursor.line().number;
  header.reals = header_numbers(cursor, real_columns, 50, file);
  forget_missing(header.integers, missing_integer);
  forget_missing(header.reals, missing_real);
  return header;
}

Promise promise_in(const Header& header, const std::string& file) {
  const int line = header.integers_line + 2;  // Int(17) is the first of the third row
  const std::optional<double> count = header.integers[16];
  return promise_of(count ? fmt::format("{}", *count) : "a missing number", line, file);
}

void pass_comments(const Header& header, LineCursor& cursor, const std::string& file) {
  const double comments = header.integers[15].value_or(0);
  for (double i = 0; i < comments; ++i, cursor.advance())
    if (cursor.at_end())
      throw input_error(at_line(file, header.integers_line + 1),
                        fmt::format("found {} comment lines promised, but {} there", comments, i),
                        "was the file cut off?");
}

// 8 columns of 10, or 5 of 14: as wide as the first row.
Columns columns_of(const LineCursor& cursor, std::size_t count, const std::string& file) {
  const std::string_view row = cursor.at_end() ? std::string_view{} : cursor.line().text;
  const std::size_t length = row.find_last_not_of(" \t") + 1;
  constexpr std::array<Columns, 2> ways{Columns{8, 10}, Columns{5, 14}};
  for (const Columns& columns : ways)
    if (length == columns.width * std::min(columns.per_row, count)) return columns;
  for (const Columns& columns : ways)  // with more numbers than promised, or too few
    if (length > 0 && length % columns.width == 0 && length <= columns.width * columns.per_row) return columns;
  throw input_error(at_line(file, cursor.line().number),
                    fmt::format("found {} characters in {}", length, in_quotes(row)),
                    "a full row has eight values of 10 characters or five of 14");
}

// "station = San Francisco, 1295 Shafter, F component=    360"
std::string name_in(const Header& header) {
  for (const TextLine& line : header.text)
    if (const std::string_view name = stripped(text_after(line.text, "component=")); !name.empty())
      return std::string(name);
  return {};
}

void say_peak(const Header& header, ReadComponent& read) {
  for (std::size_t number : {30, 32})
    if (const auto value = header.reals[number - 1];
        value && std::abs(*value) > (read.peak ? std::abs(read.peak->value) : 0))
      read.peak = StatedPeak{*value, 1e-7 * std::abs(*value), header.reals_line + 5};
}

std::size_t numbers_after(const Body& body, LineCursor& cursor, const Columns& columns) {
  std::size_t numbers = body.surplus;
  for (; !cursor.at_end(); cursor.advance())
    if (is_row(cursor.line().text, columns)) numbers += columns.per_row;
  return numbers;
}

TimeColumn times_of(const Body& body, const Columns& columns) {
  TimeColumn column;
  column.times = column_of(body.values, 2, 0);
  column.unit = "s";
  column.finest = {15, columns.width == 10 ? 5 : 8};  // digits, as in -2.1458E+0
  for (std::size_t i = 0; i < column.times.size(); ++i)
    column.lines.push_back(body.first_line + static_cast<int>(2 * i / columns.per_row));
  return column;
}

// (time, value) pairs, where no sample rate is given.
void take_pairs(const Body& body, const Columns& columns, const RecordHints& hints, const std::string& where,
                ReadComponent& read, std::vector<std::string>& notes) {
  if (body.values.size() % 2 != 0)
    throw input_error(at_line(where, body.first_line),
                      fmt::format("found {} numbers, which make no pairs of time and value", body.values.size()),
                      "without a sample rate in Real(2) the numbers must be pairs");
  std::vector<double> values = column_of(body.values, 2, 1);
  read.peak_found = largest_of(values);
  EvenSamples even = even_samples(times_of(body, columns), std::move(values), hints.step, where);
  read.values = std::move(even.values);
  read.says.step = StatedTime{even.step, body.first_line};
  if (!even.interpolated) read.stated_samples = body.values.size() / 2;
  notes.insert(notes.end(), even.notes.begin(), even.notes.end());
}

void say_unit(std::string_view content, const RecordHints& hints, const std::string& where, ReadComponent& read) {
  const bool known = !quantity_of(content)->begins_with.starts_with('0');
  if (known || hints.unit)
    read.says.unit = known ? StatedUnit{"cm/s2", 1} : StatedUnit{*hints.unit, 1};
  else
    throw input_error(at_line(where, 1), "the first line says that the quantity is unknown",
                      "if it is an acceleration, state its unit beside the file in the study, e.g. units = \"cm/s2\"");
}

}  // namespace

bool recognises_smc(std::string_view content) { return quantity_of(content) != nullptr; }

FileOfRecords read_smc(std::string_view content, const std::string& where, const RecordHints& hints) {
  if (const Quantity* quantity = quantity_of(content); !quantity->is_acceleration)
    refuse_quantity(at_line(where, 1), std::string(quantity->name));
  LineCursor cursor(content);
  const Header header = header_of(cursor, where);
  const Promise promise = promise_in(header, where);
  pass_comments(header, cursor, where);
  const Columns columns = columns_of(cursor, promise.values, where);
  Body body = read_body(cursor, columns, promise, where);

  FileOfRecords file;
  file.format = smc_name;
  if (const std::size_t more = numbers_after(body, cursor, columns))
    file.notes.push_back(fmt::format("about {} numbers after the {} promised ones are left out", more, promise.values));
  ReadComponent read;
  read.name = name_in(header);
  say_unit(content, hints, where, read);
  say_peak(header, read);
  if (const auto rate = header.reals[1]) {
    read.says.step = rate_stated(fmt::format("{}", *rate), header.reals_line, where);
    read.stated_samples = promise.values;
    read.values = std::move(body.values);
  } else {
    take_pairs(body, columns, hints, where, read, file.notes);
  }
  file.components.push_back(finished(std::move(read), hints, where));
  RecordComponent& component = file.components.front();
  const bool horizontal = header.integers[12] == 90;
  if (horizontal && !component.azimuth && header.integers[13] && *header.integers[13] <= 360)
    component.azimuth = std::fmod(*header.integers[13], 360);
  return file;
}

}  // namespace pilotis
