#include "io/records/csmip_volume1.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "io/records/csmip.hpp"
#include "io/records/number.hpp"
#include "io/records/uneven.hpp"

namespace pilotis {

namespace {

constexpr Columns of_pairs{10, 7, 3}, of_samples{8, 9, 6};

bool begins_channel(std::string_view line) { return begins(stripped(line), "uncorrected accelerogram"); }

// All fields of a row are numbers with the decimals of the columns.
bool fits(std::string_view line, const Columns& columns) {
  const std::string_view row = line.substr(0, line.find_last_not_of(" \t") + 1);
  if (row.empty() || row.size() % columns.width != 0 || row.size() > columns.per_row * columns.width) return false;
  for (std::size_t begin = 0; begin < row.size(); begin += columns.width) {
    const std::string_view field = stripped(row.substr(begin, columns.width));
    const bool number = parse_number(field).kind == ParsedNumber::Kind::number;
    if (!number || printed_precision(field).decimals != columns.decimals) return false;
  }
  return true;
}
bool begins_pairs(std::string_view line) { return fits(line, of_pairs); }
bool begins_samples(std::string_view line) { return fits(line, of_samples); }

const TextLine* line_with(const std::vector<TextLine>& header, std::string_view phrase) {
  for (const TextLine& line : header)
    if (holds(line.text, phrase)) return &line;
  return nullptr;
}

// "UNITS OF UNCOR ACCEL ARE SEC AND G/10.     MAX  = -0.051 G, AT   3.910 SEC", in g.
std::optional<StatedPeak> peak_in(const std::vector<TextLine>& header) {
  const TextLine* line = line_with(header, "max");
  if (line == nullptr || !holds(line->text, " g")) return std::nullopt;
  return stated_peak(first_number_in(text_after(text_after(line->text, "max"), "=")), line->number);
}

// The number of samples in front of "points" or "pts" that is no rate, or after "no. of points".
std::pair<std::string_view, int> count_in(const std::vector<TextLine>& header, const std::string& file) {
  for (const TextLine& line : header) {
    if (const auto token = first_number_in(text_after(line.text, "no. of points")); !token.empty())
      return {token, line.number};
    const std::string_view token = first_number_in(line.text);
    const std::string_view unit = token.empty() ? token : stripped(text_after(line.text, token));
    if ((begins(unit, "points") || begins(unit, "pts")) && !begins(unit, "pts/sec")) return {token, line.number};
  }
  throw input_error(at_line(file, header.front().number),
                    "the header of this channel does not say how many points it has",
                    "a line such as NO. OF POINTS = 3500 is needed");
}

// The number in front of "pts/sec".
StatedTime step_by_rate(const TextLine& line, const std::string& file) {
  const std::string lower = lower_case(line.text);
  const std::string_view before = stripped(std::string_view(line.text).substr(0, lower.find("pts/sec")));
  const std::size_t begin = before.find_last_of(" \t(,=") + 1;
  return rate_stated(before.substr(begin), line.number, file);
}

void say_name(const std::vector<TextLine>& header, ReadComponent& read) {
  const ChannelName channel = csmip_channel(header);
  read.name = channel.name;
  read.channel = channel.number;
  read.peak = peak_in(header);
}

RecordComponent read_samples(LineCursor& cursor, const RecordHints& hints, const std::string& where) {
  const std::vector<TextLine> header =
      csmip_header(cursor, begins_samples, "a first row of numbers with six decimals", where);
  const TextLine* rate = line_with(header, "pts/sec");
  if (rate == nullptr)
    throw input_error(at_line(where, header.front().number), "this channel has no line with \"pts/sec\"",
                      "the number of points a second is needed");
  const auto [count, line] = count_in(header, where);
  const Promise promise = promise_of(count, line, where);
  Body body = read_body(cursor, of_samples, promise, where);
  refuse_surplus(body, cursor, of_samples, promise, where);
  ReadComponent read;
  say_name(header, read);
  read.values = std::move(body.values);
  read.stated_samples = promise.values;
  read.says.step = step_by_rate(*rate, where);
  read.says.unit = StatedUnit{"g", rate->number};
  return finished(std::move(read), hints, where);
}

TimeColumn times_of(const Body& body) {
  TimeColumn column;
  column.times = column_of(body.values, 2, 0);
  column.unit = "s";
  column.finest = {of_pairs.decimals, 15};
  const std::size_t pairs_a_row = of_pairs.per_row / 2;
  for (std::size_t i = 0; i < column.times.size(); ++i)
    column.lines.push_back(body.first_line + static_cast<int>(i / pairs_a_row));
  return column;
}

RecordComponent read_pairs(LineCursor& cursor, const RecordHints& hints, const std::string& where) {
  const std::vector<TextLine> header =
      csmip_header(cursor, begins_pairs, "a first row of pairs, time and acceleration, with three decimals", where);
  const TextLine* units = line_with(header, "g/10");
  if (units == nullptr)
    throw input_error(at_line(where, header.front().number),
                      "this channel does not say that its units are SEC AND G/10",
                      "pairs of times and accelerations are known in these units only");
  const auto [count, line] = count_in(header, where);
  const Promise promise = promise_of(count, line, where, 2);
  const Body body = read_body(cursor, of_pairs, promise, where);
  refuse_surplus(body, cursor, of_pairs, promise, where);
  std::vector<double> values = column_of(body.values, 2, 1);
  ReadComponent read;
  read.peak_found = largest_of(values);
  EvenSamples even = even_samples(times_of(body), std::move(values), hints.step, where);
  say_name(header, read);
  if (read.peak) read.peak->value *= 10, read.peak->last_digit *= 10;
  read.values = std::move(even.values);
  if (!even.interpolated) read.stated_samples = promise.values / 2;
  read.says.step = StatedTime{even.step, body.first_line};
  read.says.unit = StatedUnit{"g/10", units->number};
  RecordComponent component = finished(std::move(read), hints, where);
  component.notes.insert(component.notes.end(), even.notes.begin(), even.notes.end());
  return component;
}

bool holds_pairs(std::string_view content) { return holds(content.substr(0, 2000), "sec and g/10"); }

}  // namespace

bool recognises_csmip_volume1(std::string_view content) { return begins_channel(first_line_of(content)); }

FileOfRecords read_csmip_volume1(std::string_view content, const std::string& where, const RecordHints& hints) {
  FileOfRecords file;
  file.format = csmip_volume1_name;
  const auto read_channel = holds_pairs(content) ? read_pairs : read_samples;
  for (LineCursor cursor(content); !cursor.at_end();) {
    file.components.push_back(read_channel(cursor, hints, where));
    pass_csmip_end(cursor, begins_channel, where);
  }
  return file;
}

}  // namespace pilotis
