#include "io/records/bhrc.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"
#include "io/records/archive.hpp"
#include "io/records/body.hpp"
#include "io/records/number.hpp"

namespace pilotis {

namespace {

constexpr std::size_t text_lines = 13, integer_lines = 7, real_lines = 7;
constexpr Columns ten_of_13{10, 13};

bool begins_component(std::string_view line) { return holds(line, "vol1ds file"); }

const TextLine& line_with(const std::vector<TextLine>& text, std::string_view phrase, const std::string& file) {
  for (const TextLine& line : text)
    if (holds(line.text, phrase)) return line;
  throw input_error(at_line(file, text.front().number),
                    fmt::format("this component's header has no line with {}", in_quotes(phrase)),
                    "was the file cut off?");
}

// The first field of the second line of reals.
StatedTime step_in(const std::vector<TextLine>& reals, const std::string& file) {
  if (reals.size() < real_lines) throw input_error(file, "the file ends inside its header", "was it cut off?");
  return rate_stated(first_number_in(reals[1].text), reals[1].number, file);
}

void require_duration(const TextLine& line, double seconds, const std::string& file) {
  const std::string_view token = first_number_in(text_after(line.text, "duration"));
  if (token.empty()) return;
  const std::string where = at_line(file, line.number);
  const double stated = require_number(token, where);
  if (std::abs(stated - seconds) <= 1) return;
  throw input_error(where, fmt::format("found a duration of {} s, but the points make {} s", stated, seconds),
                    "is the number of points or of samples a second damaged?");
}

// "... Azimuth L 50    T 140": where the component of this letter points.
std::optional<double> azimuth_in(const std::vector<TextLine>& text, char letter) {
  for (const TextLine& line : text) {
    const std::string_view rest = text_after(line.text, "azimuth");
    const std::size_t at = rest.find(letter);
    if (rest.empty() || at == std::string_view::npos) continue;
    const ParsedNumber parsed = parse_number(first_number_in(rest.substr(at)));
    if (parsed.kind == ParsedNumber::Kind::number && parsed.value >= 0 && parsed.value <= 360)
      return std::fmod(parsed.value, 360);
  }
  return std::nullopt;
}

RecordComponent read_component(LineCursor& cursor, const RecordHints& hints, const std::string& where) {
  const std::vector<TextLine> text = cursor.take(text_lines);
  cursor.take(integer_lines);
  const StatedTime step = step_in(cursor.take(real_lines), where);
  const TextLine& points = line_with(text, "no. of points", where);
  const TextLine& units = line_with(text, "units are", where);
  if (!holds(units.text, "g/10"))
    throw input_error(at_line(where, units.number), fmt::format("found {}", in_quotes(units.text)),
                      "the unit G/10 is known in this format");
  const Promise promise = promise_of(first_number_in(text_after(points.text, "no. of points")), points.number, where);
  Body body = read_body(cursor, ten_of_13, promise, where);
  refuse_surplus(body, cursor, ten_of_13, promise, where);
  require_duration(points, static_cast<double>(promise.values) * step.seconds, where);

  ReadComponent read;
  read.name = stripped(text_after(line_with(text, "comp ", where).text, "comp "));
  read.values = std::move(body.values);
  read.stated_samples = promise.values;
  read.says.unit = StatedUnit{"g/10", units.number};
  read.says.step = step;
  RecordComponent component = finished(std::move(read), hints, where);
  if (!component.name.empty()) component.azimuth = azimuth_in(text, component.name.front());
  return component;
}

void pass_end(LineCursor& cursor, const std::string& file) {
  bool ended = false;
  for (; !cursor.at_end() && !begins_component(cursor.line().text); cursor.advance()) {
    const std::string_view text = stripped(cursor.line().text);
    if (text.starts_with("/&"))
      ended = true;
    else if (!text.empty())
      throw input_error(at_line(file, cursor.line().number),
                        fmt::format("found {} after the numbers of a component", in_quotes(text)),
                        "the mark /& must follow");
  }
  if (!ended)
    throw input_error(at_line(file, cursor.line().number), "found no mark /& after the numbers of a component",
                      "was the file cut off?");
}

}  // namespace

bool recognises_bhrc(std::string_view content) { return begins_component(first_line_of(content)); }

FileOfRecords read_bhrc(std::string_view content, const std::string& where, const RecordHints& hints) {
  FileOfRecords file;
  file.format = bhrc_name;
  for (LineCursor cursor(content); !cursor.at_end();) {
    file.components.push_back(read_component(cursor, hints, where));
    pass_end(cursor, where);
  }
  return file;
}

}  // namespace pilotis
