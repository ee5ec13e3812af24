#include "io/records/plain.hpp"

#include <fmt/format.h>

#include <optional>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/components.hpp"
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

// In seconds. A stated step is exact, printed times are rounded.
EvenTimes times_of(const Table& table, const PlainHeader& header, const RecordHints& hints, const std::string& file) {
  const double factor = si_factor(header.time_unit, Dimension::time, file);
  std::optional<double> stated;
  if (header.statements.step || hints.step) stated = agreed_step(header.statements, hints, file);
  TimeColumn column;
  column.finest = table.finest;
  column.lines = table.lines;
  column.unit = header.time_unit;
  column.times.reserve(table.rows());
  for (std::size_t row = 0; row < table.rows(); ++row) column.times.push_back(table.at(row, *header.time_column));
  const bool in_seconds = factor == 1;
  EvenTimes even = even_times(column, stated && !in_seconds ? *stated / factor : stated, file);
  const bool at_one_step = even.first == even.step;
  even.step = stated.value_or(even.step * factor);
  even.first = at_one_step ? even.step : even.first * factor;
  return even;
}

// Times that start elsewhere than at 0 or one step are shifted to 0.
double first_sample_of(const EvenTimes& even, const Statements& says, const RecordHints& hints, const std::string& file,
                       std::vector<std::string>& notes) {
  const double step = even.step;
  const bool after_one_step = even.first == step;
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

// Step and first sample, alike for all columns.
struct Timing {
  double step = 0, first_sample_at = 0;  // s
  std::vector<std::string> notes;
};

Timing timing_by_column(const Table& table, const PlainHeader& header, const RecordHints& hints,
                        const std::string& where) {
  Timing timing;
  const EvenTimes even = times_of(table, header, hints, where);
  if (!header.time_unit_stated) timing.notes.push_back("the times have no unit: taken as seconds");
  if (even.finer_than_printed)
    timing.notes.push_back(
        fmt::format("the times are rounded: a step of {:.10g} s fits them best; state it to be exact", even.step));
  timing.step = even.step;
  timing.first_sample_at = first_sample_of(even, header.statements, hints, where, timing.notes);
  return timing;
}

Timing timing_by_statement(const PlainHeader& header, const RecordHints& hints, const std::string& where) {
  Timing timing;
  timing.step = agreed_step(header.statements, hints, where);
  timing.first_sample_at = agreed_first_sample(header.statements, hints, timing.step, where, timing.notes);
  return timing;
}

RecordComponent component_of(const Table& table, const PlainColumn& column, Statements says, const Timing& timing,
                             const RecordHints& hints, const std::string& where) {
  if (column.unit) state_unit(says, *column.unit, where);
  RecordComponent component;
  component.name = column.name;
  component.azimuth = azimuth_of_name(column.name);
  component.unit = agreed_unit(says, hints, where);
  component.record.step = timing.step;
  component.record.first_sample_at = timing.first_sample_at;
  const double factor = si_factor(component.unit, Dimension::acceleration, where);
  component.record.samples.reserve(table.rows());
  for (std::size_t row = 0; row < table.rows(); ++row)
    component.record.samples.push_back(table.at(row, column.index) * factor);
  return component;
}

}  // namespace

bool recognises_plain(std::string_view) { return true; }

FileOfRecords read_plain(std::string_view content, const std::string& where, const RecordHints& hints) {
  const PlainText text = sorted_lines(content, where);
  const PlainHeader header = plain_header(text, columns_in(text.rows.front()), where);
  const Table table = read_table(text.rows, header.time_column, where);
  require_two_samples(table, where);
  Timing timing =
      header.time_column ? timing_by_column(table, header, hints, where) : timing_by_statement(header, hints, where);
  FileOfRecords file;
  file.format = plain_name;
  for (const PlainColumn& column : header.values)
    file.components.push_back(component_of(table, column, header.statements, timing, hints, where));
  file.notes = std::move(timing.notes);
  return file;
}

}  // namespace pilotis
