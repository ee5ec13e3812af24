#include "io/records/knet.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numeric>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/number.hpp"

namespace pilotis {

namespace {

constexpr std::size_t header_lines = 17;
constexpr Columns between_blanks{};

const TextLine& line_of(const std::vector<TextLine>& header, std::string_view label, const std::string& file) {
  for (const TextLine& line : header)
    if (begins(stripped(line.text), label)) return line;
  throw input_error(at_line(file, header.back().number), fmt::format("the header has no line {}", in_quotes(label)),
                    fmt::format("{} lines of labels are needed", header_lines));
}

// The first number behind the label.
double number_of(const std::vector<TextLine>& header, std::string_view label, const std::string& file) {
  const TextLine& line = line_of(header, label, file);
  const double value = require_number(first_number_in(text_after(line.text, label)), at_line(file, line.number));
  if (value > 0) return value;
  throw input_error(at_line(file, line.number), fmt::format("found {}", in_quotes(line.text)), "it must be above 0");
}

// gal per count, from "Scale Factor      3920(gal)/6182761".
double scale_of(const std::vector<TextLine>& header, const std::string& file) {
  const TextLine& line = line_of(header, "scale factor", file);
  const std::string where = at_line(file, line.number);
  const std::string_view text = text_after(line.text, "scale factor");
  if (!holds(text, "(gal)/"))
    throw input_error(where, fmt::format("found {}", in_quotes(line.text)), "e.g. 3920(gal)/6182761 is needed");
  const double gal = require_number(first_number_in(text), where);
  const double counts = require_number(first_number_in(text_after(text, "(gal)/")), where);
  if (gal > 0 && counts > 0) return gal / counts;
  throw input_error(where, fmt::format("found {}", in_quotes(line.text)), "both numbers must be above 0");
}

// "Dir.              E-W", or 1 to 6 of KiK-net.
std::string direction_of(const std::vector<TextLine>& header, const std::string& file) {
  return std::string(stripped(text_after(line_of(header, "dir", file).text, "dir.")));
}

bool is_borehole(const std::string& direction) { return direction == "1" || direction == "2" || direction == "3"; }

std::optional<StatedPeak> peak_in(const std::vector<TextLine>& header) {
  for (const TextLine& line : header)
    if (begins(stripped(line.text), "max. acc.") || begins(stripped(line.text), "max acc."))
      return stated_peak(first_number_in(text_after(line.text, ")")), line.number);
  return std::nullopt;
}

// Of the surface sensor 4 points north, 5 east and 6 up; how a borehole sensor is turned is not known exactly.
bool is_number_of_kiknet(const std::string& name) { return name.size() == 1 && name >= "1" && name <= "6"; }
std::optional<double> azimuth_of_kiknet(char number) {
  if (number == '4') return 0;
  if (number == '5') return 90;
  return std::nullopt;
}

// Counts are whole numbers: the mean is exact enough in any order.
double take_off_mean(std::vector<double>& values) {
  const double mean = std::accumulate(values.begin(), values.end(), 0.0) / static_cast<double>(values.size());
  for (double& value : values) value -= mean;
  return mean;
}

}  // namespace

bool recognises_knet(std::string_view content) {
  const std::string_view head = content.substr(0, 2000);
  return begins(first_line_of(content), "origin time") && holds(head, "sampling freq") && holds(head, "scale factor");
}

FileOfRecords read_knet(std::string_view content, const std::string& where, const RecordHints& hints) {
  LineCursor cursor(content);
  const std::vector<TextLine> header = cursor.take(header_lines);
  const TextLine& duration_line = line_of(header, "duration time", where);
  const double rate = number_of(header, "sampling freq(hz)", where);
  const double samples = std::round(rate * number_of(header, "duration time(s)", where));
  const Promise promise = promise_of(fmt::format("{:.0f}", samples), duration_line.number, where);
  Body body = read_body(cursor, between_blanks, promise, where);
  refuse_surplus(body, cursor, between_blanks, promise, where);

  ReadComponent read;
  read.name = direction_of(header, where);
  const double scale = scale_of(header, where), mean = take_off_mean(body.values);
  for (double& value : body.values) value *= scale;
  read.values = std::move(body.values);
  read.stated_samples = promise.values;
  read.says.unit = StatedUnit{"gal", line_of(header, "scale factor", where).number};
  read.says.step = StatedTime{1 / rate, line_of(header, "sampling freq", where).number};
  read.peak = peak_in(header);

  FileOfRecords file;
  file.format = knet_name;
  file.components.push_back(finished(std::move(read), hints, where));
  RecordComponent& component = file.components.front();
  component.notes.push_back(fmt::format("the mean of the record, {:.4g} gal, is taken off", mean * scale));
  if (is_number_of_kiknet(component.name)) component.azimuth = azimuth_of_kiknet(component.name.front());
  if (is_borehole(component.name))
    component.notes.push_back("recorded at the foot of a borehole, not at the surface (KiK-net, components 1 to 3)");
  return file;
}

}  // namespace pilotis
