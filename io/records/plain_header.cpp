#include "io/records/plain_header.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/heading.hpp"
#include "io/records/number.hpp"

namespace pilotis {

namespace {

struct NamedColumns {
  std::vector<Heading> headings;  // one per column; empty when the file names none
  int line = 0;
};

// "0.02 s", "0.02", "20 ms".
double time_in(const std::string& text, const std::string& unit_in_key, const std::string& where) {
  const std::size_t end = std::min(text.find_first_of(" \t"), text.size());
  const double value = require_number(text.substr(0, end), where);
  const std::string unit(stripped(text.substr(end)));
  return value * si_factor(!unit.empty() ? unit : unit_in_key.empty() ? "s" : unit_in_key, Dimension::time, where);
}

// The unit after "units:"; with several ("s, m/s2") the one that is an acceleration.
std::string unit_in(const std::string& text) {
  for (char separator : {',', ';'})
    for (std::string_view cell : cells_of(text, separator))
      if (const Heading heading = heading_of(cell); heading.role == Role::acceleration && !heading.unit.empty())
        return heading.unit;
  return known_unit(stripped(text));
}

// "time step (s): 0.02" taken apart.
struct KeyedLine {
  std::string key;  // lower case, single blanks, without its unit
  std::string unit;
  std::string value;
};

KeyedLine keyed(std::string_view text) {
  constexpr std::size_t longest_key = 60;
  KeyedLine line;
  const std::size_t mark = text.find_first_of(":=");
  if (mark > longest_key) return line;
  std::string key = lower_case(text.substr(0, mark));
  std::replace(key.begin(), key.end(), '_', ' ');
  if (const std::size_t open = key.find_first_of("(["); open != std::string::npos) {
    const std::size_t close = key.find_first_of(")]", open);
    line.unit = stripped(std::string_view(key).substr(open + 1, close - open - 1));
    key.resize(open);
  }
  for (std::string_view word : words_of(key)) line.key += (line.key.empty() ? "" : " ") + std::string(word);
  line.value = stripped(text.substr(mark + 1));
  return line;
}

constexpr std::array<std::string_view, 6> unit_keys{
    "unit", "units", "acceleration unit", "acceleration units", "unit of acceleration", "units of acceleration"};
constexpr std::array<std::string_view, 6> step_keys{"step",    "time step",         "dt",
                                                    "delta t", "sampling interval", "time interval"};
constexpr std::array<std::string_view, 2> first_keys{"first sample", "first sample at"};

bool is_among(const std::string& key, const auto& keys) {
  return std::find(keys.begin(), keys.end(), key) != keys.end();
}

// Lines such as "units: g" and "step: 0.02 s". True when the line is one.
bool states_a_fact(const TextLine& line, PlainHeader& header, const std::string& file) {
  const KeyedLine said = keyed(line.text);
  if (said.key.empty() || said.value.empty()) return false;
  const std::string where = at_line(file, line.number);
  Statements& says = header.statements;
  if (is_among(said.key, unit_keys))
    state_unit(says, {unit_in(said.value), line.number}, file);
  else if (is_among(said.key, step_keys))
    state_time(says.step, {time_in(said.value, said.unit, where), line.number}, "the step", file);
  else if (is_among(said.key, first_keys))
    state_time(says.first_sample_at, {time_in(said.value, said.unit, where), line.number}, "the first sample", file);
  else
    return false;
  return true;
}

// A comment that is only "[cm/s2]", or a piece of one such as "acceleration (g)".
void look_for_bracketed_unit(const TextLine& comment, Statements& says, const std::string& file) {
  for (std::string_view piece : cells_of(comment.text, ',')) {
    const Heading heading = heading_of(piece);
    if (heading.role == Role::acceleration && heading.bracketed && !heading.unit.empty())
      state_unit(says, {heading.unit, comment.number}, file);
  }
}

bool all_known(const std::vector<Heading>& headings) {
  return std::none_of(headings.begin(), headings.end(), [](const Heading& h) { return h.role == Role::unknown; });
}

// A line of names and then perhaps one of units, above the first row.
void add_headings(const TextLine& line, std::size_t columns, NamedColumns& names, const std::string& file) {
  const std::string where = at_line(file, line.number);
  std::vector<Heading> found = headings_of(line.text, columns);
  const bool only_units = !found.empty() && std::all_of(found.begin(), found.end(), [](const Heading& h) {
    return !h.unit.empty() && (h.unit == known_unit(h.text) || h.bracketed);
  });
  if (found.empty() || (!names.headings.empty() && !only_units))
    throw input_error(
        where, fmt::format("found {} above the rows of {} column(s)", in_quotes(line.text), columns),
        "only comments (# % * | /), one line naming every column and one line of units are allowed there");
  if (names.headings.empty()) {
    names = {std::move(found), line.number};
    return;
  }
  for (std::size_t i = 0; i < columns; ++i) {
    names.headings[i].unit = found[i].unit;
    if (names.headings[i].role == Role::unknown) names.headings[i].role = found[i].role;
  }
}

NamedColumns named_columns(const PlainText& text, std::size_t columns, PlainHeader& header, const std::string& file) {
  NamedColumns names;
  const int first_row = text.rows.front().number;
  for (const TextLine& comment : text.comments) {
    if (states_a_fact(comment, header, file)) continue;
    look_for_bracketed_unit(comment, header.statements, file);
    if (columns < 2 || comment.number > first_row) continue;
    std::vector<Heading> found = headings_of(comment.text, columns);
    if (!found.empty() && all_known(found)) names = {std::move(found), comment.number};
  }
  NamedColumns above;
  for (const TextLine& line : text.headings)
    if (!states_a_fact(line, header, file)) add_headings(line, columns, above, file);
  return above.headings.empty() ? names : above;
}

std::vector<std::size_t> columns_of(const NamedColumns& names, Role role) {
  std::vector<std::size_t> found;
  for (std::size_t i = 0; i < names.headings.size(); ++i)
    if (names.headings[i].role == role) found.push_back(i);
  return found;
}

[[noreturn]] void refuse_columns(const std::string& where, std::string what) {
  throw input_error(where, std::move(what),
                    "give one component: two columns, time and acceleration, or one column of samples; or name the "
                    "columns in a line above them, e.g. \"time (s), acceleration (m/s^2), velocity (m/s)\"; decimal "
                    "commas need ; or tabs between columns");
}

// The columns of values among named ones: the accelerations, or what is left beside the time.
std::vector<std::size_t> named_value_columns(const NamedColumns& names, const std::optional<std::size_t>& time,
                                             const std::string& where) {
  if (const auto accelerations = columns_of(names, Role::acceleration); !accelerations.empty()) return accelerations;
  const std::size_t others = names.headings.size() - (time ? 1 : 0);
  if (others != 1)
    refuse_columns(where, fmt::format("found {} columns, none of them named an acceleration", names.headings.size()));
  const std::size_t left = time && *time == 0 ? 1 : 0;
  const Heading& heading = names.headings[left];
  if (heading.role != Role::unknown)
    throw input_error(where, fmt::format("found {}, which is no acceleration", in_quotes(heading.text)),
                      "the acceleration of the ground is needed");
  return {left};
}

void choose_named(const NamedColumns& names, PlainHeader& header, const std::string& file) {
  const std::string where = at_line(file, names.line);
  const std::vector<std::size_t> times = columns_of(names, Role::time);
  if (times.size() > 1) refuse_columns(where, fmt::format("found {} columns of time", times.size()));
  if (!times.empty()) header.time_column = times.front();
  const bool first_unnamed = names.headings.size() == 2 && times.empty() && names.headings[0].role == Role::unknown;
  if (first_unnamed) header.time_column = 0;
  for (const std::size_t index : named_value_columns(names, header.time_column, where)) {
    const Heading& heading = names.headings[index];
    header.values.push_back({index, heading.name, std::nullopt});
    if (!heading.unit.empty()) header.values.back().unit = StatedUnit{heading.unit, names.line};
  }
  if (times.empty() || names.headings[times.front()].unit.empty()) return;
  header.time_unit = names.headings[times.front()].unit;
  header.time_unit_stated = true;
  si_factor(header.time_unit, Dimension::time, where);
}

void choose_unnamed(std::size_t columns, const PlainText& text, PlainHeader& header, const std::string& file) {
  if (columns > 2)
    refuse_columns(at_line(file, text.rows.front().number),
                   fmt::format("found {} columns in {}", columns, in_quotes(text.rows.front().text)));
  if (columns == 2) header.time_column = 0;
  header.values.push_back({columns - 1, {}, {}});
}

}  // namespace

PlainHeader plain_header(const PlainText& text, std::size_t columns, const std::string& file) {
  PlainHeader header;
  const NamedColumns names = named_columns(text, columns, header, file);
  if (names.headings.empty())
    choose_unnamed(columns, text, header, file);
  else
    choose_named(names, header, file);
  return header;
}

}  // namespace pilotis
