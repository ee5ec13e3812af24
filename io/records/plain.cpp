#include "io/records/plain.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/even_times.hpp"
#include "io/records/plain_header.hpp"
#include "io/records/stated.hpp"
#include "io/records/table.hpp"

namespace pilotis {

namespace {

void require_two_samples(const Table& table, const std::string& file) {
  if (table.rows() < 2)
    throw input_error(at_line(file, table.lines.front()), "found one row of numbers only",
                      "a record needs at least two samples, one in each row");
}

EvenTimes times_of(const Table& table, const PlainHeader& header, const std::string& file) {
  TimeColumn column;
  column.finest = table.finest[*header.time_column];
  column.lines = table.lines;
  for (std::size_t row = 0; row < table.rows(); ++row) column.times.push_back(table.at(row, *header.time_column));
  EvenTimes even = even_times(column, file);
  const double factor = si_factor(header.time_unit, Dimension::time, file);
  even.step *= factor;
  even.first *= factor;
  even.doubt *= factor;
  return even;
}

// The step as stated where it is stated: printed times are rounded, a stated step is not.
double step_of(const EvenTimes& even, const Statements& says, const RecordHints& hints, const std::string& file) {
  if (!says.step && !hints.step) return even.step;
  const double stated = agreed_step(says, hints, file);
  if (std::abs(stated - even.step) <= even.doubt + 1e-9 * even.step) return stated;
  throw input_error(
      says.step ? at_line(file, says.step->line) : file,
      fmt::format("the step is stated as {} s, but the times of the file rise by {} s", stated, even.step),
      "correct one of them");
}

// Times that start elsewhere than at 0 or one step are shifted to 0.
double first_sample_of(const EvenTimes& even, double step, const Statements& says, const RecordHints& hints,
                       const std::string& file, std::vector<std::string>& notes) {
  const bool after_one_step = std::abs(even.first - step) <= even.doubt + 1e-9 * step;
  const bool shifted = even.first != 0 && !after_one_step;
  const double first = after_one_step ? step : 0;
  if (says.first_sample_at || hints.first_sample_at) {
    const double stated = agreed_first_sample(says, hints, step, file, notes);
    if (stated != first || shifted)
      throw input_error(
          says.first_sample_at ? at_line(file, says.first_sample_at->line) : file,
          fmt::format("the first sample is stated to be at {} s, but the first time is {} s", stated, even.first),
          "correct one of them");
  }
  if (shifted) notes.push_back(fmt::format("the times start at {} s: shifted to start at 0 s", even.first));
  return first;
}

void read_timed(const Table& table, const PlainHeader& header, const RecordHints& hints, const std::string& where,
                RecordFile& file) {
  const EvenTimes even = times_of(table, header, where);
  if (!header.time_unit_stated) file.notes.push_back("the times have no unit: taken as seconds");
  file.record.step = step_of(even, header.statements, hints, where);
  file.record.first_sample_at = first_sample_of(even, file.record.step, header.statements, hints, where, file.notes);
}

}  // namespace

bool recognises_plain(std::string_view) { return true; }

RecordFile read_plain(std::string_view content, const std::string& where, const RecordHints& hints) {
  const PlainText text = sorted_lines(content, where);
  const Table table = read_table(text.rows, where);
  const PlainHeader header = plain_header(text, table.columns, where);
  require_two_samples(table, where);

  RecordFile file;
  file.format = plain_name;
  if (header.time_column) {
    read_timed(table, header, hints, where, file);
  } else {
    file.record.step = agreed_step(header.statements, hints, where);
    file.record.first_sample_at = agreed_first_sample(header.statements, hints, file.record.step, where, file.notes);
  }
  file.unit = agreed_unit(header.statements, hints, where);
  const double factor = si_factor(file.unit, Dimension::acceleration, where);
  for (std::size_t row = 0; row < table.rows(); ++row)
    file.record.samples.push_back(table.at(row, header.value_column) * factor);
  return file;
}

}  // namespace pilotis
