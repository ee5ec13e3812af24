#include "io/records/peer.hpp"

#include <fmt/format.h>

#include <charconv>
#include <regex>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/number.hpp"
#include "io/records/stated.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

constexpr std::size_t header_lines = 4;
constexpr std::size_t column_width = 15;

struct CountAndStep {
  long count = 0;
  double step = 0;  // s
};

// Line 3, e.g. "ACCELERATION TIME SERIES IN UNITS OF G".
std::string unit_in(const TextLine& line, const std::string& file) {
  const std::string where = at_line(file, line.number);
  for (const char* other : {"velocity", "displacement"})
    if (holds(line.text, other))
      throw input_error(where, fmt::format("this file holds the {} of the ground: {}", other, in_quotes(line.text)),
                        "the acceleration of the same record is needed (of this archive, the file ending in .AT2)");
  if (!holds(line.text, "acceleration"))
    throw input_error(where, fmt::format("found {} as the third header line", in_quotes(line.text)),
                      "it must name the quantity and its unit, e.g. ACCELERATION TIME SERIES IN UNITS OF G");
  static const std::regex unit_pattern(R"(UNITS\s+OF\s+([A-Z/0-9^*]+))", std::regex::icase);
  std::cmatch match;
  if (!std::regex_search(line.text.begin(), line.text.end(), match, unit_pattern)) return {};
  const std::string unit = match[1];
  return is_unit_of(unit, Dimension::acceleration) ? unit : lower_case(unit);
}

long whole_number(std::string_view text, const std::string& where) {
  long value = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (error != std::errc{} || end != text.data() + text.size() || value < 2)
    throw input_error(where, fmt::format("found NPTS = {}", in_quotes(text)),
                      "the number of values, at least 2, is needed");
  return value;
}

double step_from(std::string_view text, const std::string& unit, const std::string& where) {
  const double step = require_number(text, where);
  if (lower_case(unit).starts_with("m"))
    throw input_error(where, fmt::format("found DT in {}", in_quotes(unit)), "it must be in seconds");
  if (step <= 0) throw input_error(where, fmt::format("found DT = {}", in_quotes(text)), "it must be greater than 0 s");
  return step;
}

// Line 4: "NPTS=   7999, DT=   .0050 SEC" with any padding, or "4164  0.0100  NPTS, DT".
CountAndStep count_and_step(const TextLine& line, const std::string& file) {
  static const std::regex named(R"(NPTS\s*=\s*([^\s,]+)[\s,]*DT\s*=\s*([^\s,A-CF-Z]+)\s*([A-Z]*))", std::regex::icase);
  static const std::regex numbers_first(R"(^\s*(\S+)\s+(\S+)\s+NPTS\s*,?\s*DT)", std::regex::icase);
  const std::string where = at_line(file, line.number);
  std::cmatch match;
  if (std::regex_search(line.text.begin(), line.text.end(), match, named))
    return {whole_number(match[1].str(), where), step_from(match[2].str(), match[3], where)};
  if (std::regex_search(line.text.begin(), line.text.end(), match, numbers_first))
    return {whole_number(match[1].str(), where), step_from(match[2].str(), "", where)};
  throw input_error(where, fmt::format("found {} as the fourth header line", in_quotes(line.text)),
                    "it must give count and step, e.g. NPTS=   7999, DT=   .0050 SEC");
}

bool all_numbers(const std::vector<std::string_view>& tokens) {
  for (std::string_view token : tokens)
    if (parse_number(token).kind == ParsedNumber::Kind::not_a_number) return false;
  return true;
}

std::vector<std::string_view> fixed_columns(std::string_view row) {
  std::vector<std::string_view> columns;
  for (std::size_t begin = 0; begin < row.size(); begin += column_width) {
    const std::string_view cell = stripped(row.substr(begin, column_width));
    if (!cell.empty()) columns.push_back(cell);
  }
  return columns;
}

// Between blanks; where values run together, by the width of the columns.
std::vector<std::string_view> values_in(std::string_view row) {
  const std::vector<std::string_view> words = words_of(row);
  if (all_numbers(words)) return words;
  const std::vector<std::string_view> columns = fixed_columns(row);
  return all_numbers(columns) ? columns : words;
}

std::vector<double> samples_in(const std::vector<TextLine>& lines, long count, const std::string& file) {
  std::vector<double> samples;
  const std::string promise = fmt::format("line {} promises NPTS = {}", header_lines, count);
  for (std::size_t i = header_lines; i < lines.size(); ++i)
    for (std::string_view token : values_in(lines[i].text)) {
      const std::string where = at_line(file, lines[i].number);
      const double value = require_number(token, where);
      if (static_cast<long>(samples.size()) == count)
        throw input_error(where, fmt::format("found {} as value {}, but {}", in_quotes(token), count + 1, promise),
                          "the file must hold exactly as many values as its header says");
      samples.push_back(value);
    }
  if (static_cast<long>(samples.size()) < count)
    throw input_error(at_line(file, lines.empty() ? 1 : lines.back().number),
                      fmt::format("the file ends after {} values, but {}", samples.size(), promise),
                      "the file must hold exactly as many values as its header says; was it cut off?");
  return samples;
}

}  // namespace

bool recognises_peer(std::string_view content) {
  const std::string_view first = content.substr(0, content.find_first_of("\r\n"));
  return stripped(first).find_first_of("#%*|/") != 0 &&
         ((holds(first, "peer") && holds(first, "strong motion database record")) ||
          holds(first, "pacific engineering and analysis strong-motion data"));
}

RecordFile read_peer(std::string_view content, const std::string& where, const RecordHints& hints) {
  const std::vector<TextLine> lines = lines_of(content);
  if (lines.size() < header_lines)
    throw input_error(at_line(where, static_cast<int>(lines.size())), "the file ends inside its header",
                      fmt::format("{} header lines and the values are needed", header_lines));
  Statements statements;
  const std::string unit = unit_in(lines[2], where);
  if (!unit.empty()) state_unit(statements, {unit, lines[2].number}, where);
  const CountAndStep header = count_and_step(lines[3], where);
  statements.step = StatedTime{header.step, lines[3].number};

  RecordFile file;
  file.format = peer_name;
  file.unit = agreed_unit(statements, hints, where);
  file.record.step = agreed_step(statements, hints, where);
  file.record.first_sample_at =
      hints.first_sample_at ? agreed_first_sample({}, hints, header.step, where, file.notes) : 0;
  file.record.samples = samples_in(lines, header.count, where);
  const double factor = si_factor(file.unit, Dimension::acceleration, where);
  for (double& sample : file.record.samples) sample *= factor;
  return file;
}

}  // namespace pilotis
