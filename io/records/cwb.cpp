#include "io/records/cwb.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/even_times.hpp"
#include "io/records/labels.hpp"
#include "io/records/number.hpp"

namespace pilotis {

namespace {

std::vector<TextLine> header_of(LineCursor& cursor) {
  std::vector<TextLine> header;
  for (; !cursor.at_end(); cursor.advance()) {
    const std::string_view text = stripped(cursor.line().text);
    if (!text.empty() && text.front() != '#') break;
    if (!text.empty()) header.push_back({cursor.line().number, text.substr(1)});
  }
  return header;
}

// "Time U(+); N(+); E(+)": the names of the columns after the time.
std::vector<std::string> names_in(const Label& sequence, const std::string& file) {
  std::vector<std::string> names;
  std::string text(sequence.value);
  std::replace(text.begin(), text.end(), ';', ' ');
  for (std::string_view word : words_of(text)) names.emplace_back(word.substr(0, word.find('(')));
  if (names.size() < 2 || !begins(names.front(), "time"))
    throw input_error(at_line(file, sequence.line), fmt::format("found the columns {}", in_quotes(sequence.value)),
                      "the time and at least one component are needed, as in \"Time U(+); N(+); E(+)\"");
  names.erase(names.begin());
  return names;
}

// The larger of the two in "#AmplitudeMAX. U:    1.196~   -1.017".
std::optional<StatedPeak> peak_of(const Labels& labels, const std::string& name) {
  const Label* label = labels.find("AmplitudeMAX. " + name);
  if (label == nullptr) return std::nullopt;
  const auto first = stated_peak(first_number_in(label->value), label->line);
  const auto second = stated_peak(first_number_in(text_after(label->value, "~")), label->line);
  if (!first || !second) return first;
  return std::abs(second->value) > std::abs(first->value) ? second : first;
}

void require_even(const std::vector<double>& values, std::size_t columns, int first_line, int decimals, double step,
                  const std::string& file) {
  TimeColumn times;
  times.times = column_of(values, columns, 0);
  times.unit = "s";
  times.finest = {decimals < 0 ? 3 : decimals, 15};
  for (std::size_t i = 0; i < times.times.size(); ++i) times.lines.push_back(first_line + static_cast<int>(i));
  even_times(times, step, file);
}

void require_length(std::size_t rows, double rate, const Label& length, const std::string& file) {
  const std::string_view token = first_number_in(length.value);
  const double seconds = require_number(token, at_line(file, length.line));
  const double last_digit = std::pow(10.0, -printed_precision(token).decimals);
  const double apart = std::abs(static_cast<double>(rows) / rate - seconds);
  if (rows >= 2 && apart < last_digit * (1 - 1e-6)) return;
  throw input_error(at_line(file, length.line),
                    fmt::format("found {} rows of {} a second for a record of {} s", rows, rate, seconds),
                    "was the file cut off?");
}

}  // namespace

bool recognises_cwb(std::string_view content) {
  const std::string_view head = content.substr(0, 4000);
  return holds(head, "#samplerate") && holds(head, "#amplitudeunit");
}

FileOfRecords read_cwb(std::string_view content, const std::string& where, const RecordHints& hints) {
  LineCursor cursor(content);
  const Labels labels(header_of(cursor), where);
  const Label& rate = labels.need("SampleRate(Hz)");
  const StatedTime step = rate_stated(rate.value, rate.line, where);
  const std::vector<std::string> names = names_in(labels.need("DataSequence"), where);
  const Label& unit = labels.need("AmplitudeUnit");
  const std::string_view unit_name = unit.value.substr(0, unit.value.find_first_of(" ."));

  Columns columns{names.size() + 1, 0};
  if (const Label* format = labels.find("Data"); format != nullptr && format->name == "Data")
    if (const auto stated = columns_from(format->value)) columns = {names.size() + 1, stated->width, stated->decimals};
  const int first_line = cursor.line().number;
  const std::vector<double> values = read_rows(cursor, columns, where);
  require_length(values.size() / columns.per_row, 1 / step.seconds, labels.need("RecordLength(sec)"), where);
  require_even(values, columns.per_row, first_line, columns.decimals, step.seconds, where);

  FileOfRecords file;
  file.format = cwb_name;
  for (std::size_t i = 0; i < names.size(); ++i) {
    ReadComponent read;
    read.name = names[i];
    read.values = column_of(values, columns.per_row, i + 1);
    read.says.unit = unit_stated(unit_name, unit.line);
    read.says.step = step;
    read.peak = peak_of(labels, names[i]);
    file.components.push_back(finished(std::move(read), hints, where));
  }
  return file;
}

}  // namespace pilotis
