#include "io/records/peer.hpp"

#include <fmt/format.h>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/number.hpp"

namespace pilotis {

namespace {

constexpr std::size_t header_lines = 4;
constexpr Columns blanks_or_15{0, 0, -1, 15};

// Line 3, e.g. "ACCELERATION TIME SERIES IN UNITS OF G".
std::optional<StatedUnit> unit_in(const TextLine& line, const std::string& file) {
  const std::string where = at_line(file, line.number);
  for (const char* other : {"velocity", "displacement"})
    if (holds(line.text, other))
      throw input_error(where, fmt::format("this file holds the {} of the ground: {}", other, in_quotes(line.text)),
                        "the acceleration of the same record is needed (of this archive, the file ending in .AT2)");
  if (!holds(line.text, "acceleration"))
    throw input_error(where, fmt::format("found {} as the third header line", in_quotes(line.text)),
                      "it must name the quantity and its unit, e.g. ACCELERATION TIME SERIES IN UNITS OF G");
  std::string_view unit = stripped(text_after(line.text, "units of"));
  unit = unit.substr(0, unit.find_first_of(" \t,;"));
  unit = unit.substr(0, unit.find_last_not_of('.') + 1);
  if (unit.empty()) return std::nullopt;
  return StatedUnit{is_unit_of(unit, Dimension::acceleration) ? std::string(unit) : lower_case(unit), line.number};
}

std::string_view word_at(std::string_view text) {
  text = stripped(text);
  return text.substr(0, text.find_first_of(" \t,"));
}

struct CountAndStep {
  std::string_view count, step, unit;  // as written; unit: what follows the step
};

// Line 4: "NPTS=   7999, DT=   .0050 SEC" with any padding, or "4164  0.0100  NPTS, DT".
CountAndStep count_and_step(const TextLine& line, const std::string& file) {
  const std::string_view points = stripped(text_after(line.text, "npts")),
                         interval = stripped(text_after(points, "dt"));
  if (points.starts_with('=') && interval.starts_with('=')) {
    const std::string_view step = first_number_in(word_at(interval.substr(1)));
    const std::string_view rest = step.empty() ? interval : text_after(interval, step);
    return {word_at(points.substr(1)), step.empty() ? word_at(interval.substr(1)) : step, word_at(rest)};
  }
  const std::vector<std::string_view> words = words_of(line.text);
  if (words.size() >= 4 && begins(words[2], "npts")) return {words[0], words[1], {}};
  throw input_error(at_line(file, line.number), fmt::format("found {} as the fourth header line", in_quotes(line.text)),
                    "it must give count and step, e.g. NPTS=   7999, DT=   .0050 SEC");
}

Promise promise_in(const TextLine& line, std::string_view count, const std::string& file) {
  Promise promise = promise_of(count, line.number, file);
  promise.text = fmt::format("NPTS = {}", promise.values);
  return promise;
}

StatedTime step_in(const TextLine& line, const CountAndStep& header, const std::string& file) {
  if (lower_case(header.unit).starts_with("m"))
    throw input_error(at_line(file, line.number), fmt::format("found DT in {}", in_quotes(header.unit)),
                      "it must be in seconds");
  return step_stated(header.step, line.number, file);
}

// Line 2, e.g. "Imperial Valley-06, 10/15/1979, Cerro Prieto, 147": the last piece.
std::string name_in(const TextLine& line) {
  const std::size_t comma = line.text.rfind(',');
  return comma == std::string_view::npos ? std::string() : std::string(stripped(line.text.substr(comma + 1)));
}

}  // namespace

bool recognises_peer(std::string_view content) {
  const std::string_view first = first_line_of(content);
  return first.find_first_of("#%*|/") != 0 &&
         ((holds(first, "peer") && holds(first, "strong motion database record")) ||
          holds(first, "pacific engineering and analysis strong-motion data"));
}

FileOfRecords read_peer(std::string_view content, const std::string& where, const RecordHints& hints) {
  LineCursor cursor(content);
  const std::vector<TextLine> header = cursor.take(header_lines);
  if (header.size() < header_lines)
    throw input_error(at_line(where, cursor.line().number), "the file ends inside its header",
                      fmt::format("{} header lines and the values are needed", header_lines));
  ReadComponent read;
  read.name = name_in(header[1]);
  read.says.unit = unit_in(header[2], where);
  const CountAndStep stated = count_and_step(header[3], where);
  const Promise promise = promise_in(header[3], stated.count, where);
  read.says.step = step_in(header[3], stated, where);
  read.stated_samples = promise.values;
  Body body = read_body(cursor, blanks_or_15, promise, where);
  refuse_surplus(body, cursor, blanks_or_15, promise, where);
  read.values = std::move(body.values);

  FileOfRecords file;
  file.format = peer_name;
  file.components.push_back(finished(std::move(read), hints, where));
  return file;
}

}  // namespace pilotis
