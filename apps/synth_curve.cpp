#include "apps/synth_curve.hpp"

#include <fmt/format.h>

#include <charconv>
#include <fstream>
#include <optional>
#include <utility>

#include "core/error.hpp"
#include "core/units/units.hpp"

namespace pilotis {

namespace {

constexpr std::string_view blanks = " \t\r";

std::string_view trimmed(std::string_view text) {
  const std::size_t first = text.find_first_not_of(blanks);
  if (first == std::string_view::npos) return {};
  return text.substr(first, text.find_last_not_of(blanks) - first + 1);
}

// The two parts of a line at its comma, semicolon or, without either, its first blank.
std::optional<std::pair<std::string_view, std::string_view>> halves(std::string_view line) {
  std::size_t at = line.find_first_of(",;");
  if (at == std::string_view::npos) at = line.find_first_of(blanks);
  if (at == std::string_view::npos) return {};
  return std::pair{trimmed(line.substr(0, at)), trimmed(line.substr(at + 1))};
}

std::string column(std::string_view name, Dimension dimension) {
  return dimension == Dimension::none ? std::string(name) : fmt::format("{} ({})", name, si_unit(dimension));
}

// Factor to SI of a column named as in "acceleration (g)".
double column_factor(std::string_view text, std::string_view name, Dimension dimension, const std::string& where) {
  const std::size_t open = text.find('('), close = text.rfind(')');
  const bool named = trimmed(text.substr(0, open)) == name;
  const bool bracketed = open != std::string_view::npos && close != std::string_view::npos && close > open;
  if (!named || (!bracketed && dimension != Dimension::none))
    throw input_error(where, fmt::format("found the column \"{}\"", text),
                      fmt::format("a column such as \"{}\" is needed", column(name, dimension)));
  return bracketed ? si_factor(text.substr(open + 1, close - open - 1), dimension, where) : 1;
}

double number(std::string_view text, const std::string& where) {
  double value = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (error != std::errc{} || end != text.data() + text.size())
    throw input_error(where, fmt::format("found \"{}\"", text), "a number is needed");
  return value;
}

struct Factors {
  double x = 1, y = 1;
};

Factors heading(std::string_view line, const CurveParameter& parameter, const std::string& where) {
  std::size_t at = line.find_first_of(",;");
  if (at == std::string_view::npos)
    throw input_error(where, fmt::format("found \"{}\"", line),
                      fmt::format("the first line must name the columns: \"{}\"", curve_heading(parameter)));
  return {column_factor(trimmed(line.substr(0, at)), parameter.x_name, parameter.x, where),
          column_factor(trimmed(line.substr(at + 1)), parameter.y_name, parameter.y, where)};
}

}  // namespace

std::string curve_heading(const CurveParameter& parameter) {
  return column(parameter.x_name, parameter.x) + ", " + column(parameter.y_name, parameter.y);
}

Curve read_curve(const std::filesystem::path& file, const CurveParameter& parameter) {
  std::ifstream input(file);
  if (!input)
    throw input_error(file.string(), "it cannot be opened", fmt::format("a table of {} is needed", parameter.meaning));
  Curve curve;
  std::optional<Factors> factors;
  std::string text;
  for (int line = 1; std::getline(input, text); ++line) {
    const std::string where = fmt::format("{}:{}", file.string(), line);
    const std::string_view row = trimmed(text);
    if (row.empty() || row.front() == '#') continue;
    if (!factors) {
      factors = heading(row, parameter, where);
      continue;
    }
    const auto pair = halves(row);
    if (!pair) throw input_error(where, fmt::format("found \"{}\"", row), "two numbers are needed");
    curve.x.push_back(number(pair->first, where) * factors->x);
    curve.y.push_back(number(pair->second, where) * factors->y);
  }
  return curve;
}

}  // namespace pilotis
