#include "io/records/heading.hpp"

#include <algorithm>
#include <array>
#include <initializer_list>

#include "core/units/units.hpp"
#include "io/records/table.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

using Words = std::vector<std::string_view>;

bool any_of(const Words& words, std::initializer_list<std::string_view> wanted) {
  return std::any_of(words.begin(), words.end(), [&](std::string_view word) {
    return std::find(wanted.begin(), wanted.end(), word) != wanted.end();
  });
}

Role role_by_name(std::string_view name) {
  std::string plain = lower_case(name);
  std::replace(plain.begin(), plain.end(), '_', ' ');
  const Words words = words_of(plain);
  if (any_of(words, {"peak", "max", "maximum", "pga", "spectral", "psa", "sa", "period"})) return Role::unknown;
  if (any_of(words, {"acceleration", "accelerations", "accelerogram", "acc", "accel"})) return Role::acceleration;
  if (any_of(words, {"velocity", "velocities", "vel"})) return Role::velocity;
  if (any_of(words, {"displacement", "displacements", "disp"})) return Role::displacement;
  if (any_of(words, {"time", "times"})) return Role::time;
  if (words.size() != 1) return Role::unknown;
  if (words[0] == "t") return Role::time;
  return words[0] == "a" || words[0] == "ag" ? Role::acceleration : Role::unknown;
}

bool is_common_time_unit(std::string_view unit) {
  return any_of({unit}, {"s", "sec", "secs", "second", "seconds", "ms"});
}

// Only the usual units of time count: UDUNITS-2 takes the direction "ns" for nanoseconds.
Role role_by_unit(const std::string& unit) {
  if (is_unit_of(unit, Dimension::acceleration)) return Role::acceleration;
  if (is_common_time_unit(unit)) return Role::time;
  if (is_unit_of(unit, Dimension::velocity)) return Role::velocity;
  return is_unit_of(unit, Dimension::length) ? Role::displacement : Role::unknown;
}

// Words, except that a bracket belongs to the words before it: "time (s) ground acceleration (m / s2)" are two.
std::vector<std::string_view> bracketed_cells(std::string_view line) {
  std::vector<std::string_view> cells;
  std::size_t begin = 0;
  for (std::size_t close = line.find_first_of(")]"); close != std::string_view::npos;
       close = line.find_first_of(")]", close + 1)) {
    cells.push_back(stripped(line.substr(begin, close + 1 - begin)));
    begin = close + 1;
  }
  for (std::string_view word : words_of(line.substr(begin))) cells.push_back(word);
  return cells;
}

// "acceleration in units of g", "acceleration in g": the word at the end; `in` is where " in " begins.
std::string_view unit_after_in(std::string_view cell, std::size_t in) {
  if (in == std::string::npos) return {};
  std::string_view rest = stripped(cell.substr(in + 4));
  if (begins(rest, "units of ")) rest = stripped(rest.substr(9));
  return rest.find_first_of(" \t") == std::string_view::npos ? rest : std::string_view{};
}

}  // namespace

std::string known_unit(std::string_view unit) {
  const std::string lower = lower_case(unit), written(unit);
  const Role role = role_by_unit(lower);
  const bool shouted = role_by_unit(written) == Role::unknown && (role == Role::acceleration || role == Role::time);
  return shouted ? lower : written;
}

Heading heading_of(std::string_view cell) {
  Heading heading;
  heading.text = cell;
  std::string_view name = cell;
  const std::size_t open = cell.find_first_of("(["), close = cell.find_first_of(")]", open);
  const std::size_t in = lower_case(cell).rfind(" in ");
  if (open != std::string_view::npos && close == cell.size() - 1) {
    name = cell.substr(0, open);
    heading.unit = known_unit(stripped(cell.substr(open + 1, close - open - 1)));
    heading.bracketed = true;
  } else if (const std::string_view unit = unit_after_in(cell, in); !unit.empty()) {
    name = cell.substr(0, in);
    heading.unit = known_unit(unit);
  } else if (const std::string unit = known_unit(cell); role_by_name(name) == Role::unknown) {
    if (role_by_unit(unit) != Role::unknown) heading.unit = unit;
  }
  const bool only_unit = !heading.unit.empty() && name.size() == cell.size();
  if (!only_unit) heading.name = stripped(name);
  heading.role = role_by_name(name);
  if (heading.role == Role::unknown && !heading.unit.empty() && (heading.name.empty() || heading.bracketed))
    heading.role = role_by_unit(heading.unit);
  return heading;
}

std::vector<Heading> headings_of(std::string_view line, std::size_t columns) {
  std::vector<std::vector<std::string_view>> ways;
  if (columns == 1) ways.push_back({stripped(line)});
  for (char separator : {';', '\t', ',', ' '}) ways.push_back(cells_of(line, separator));
  ways.push_back(bracketed_cells(line));
  for (const auto& cells : ways) {
    if (cells.size() != columns) continue;
    std::vector<Heading> headings;
    for (std::string_view cell : cells) headings.push_back(heading_of(cell));
    return headings;
  }
  return {};
}

}  // namespace pilotis
