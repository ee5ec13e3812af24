#include "apps/typed_values.hpp"

#include <fmt/format.h>

#include <charconv>

#include "core/error.hpp"

namespace pilotis {

namespace {

// The place of the word among the parameter's choices.
double choice(const std::string& text, const Parameter& parameter, const std::string& where) {
  for (std::size_t i = 0; i < parameter.choices.size(); ++i)
    if (parameter.choices[i] == text) return static_cast<double>(i);
  throw input_error(where, fmt::format("found \"{}\"", text), allowed_range(parameter) + " is needed");
}

}  // namespace

std::string option_name(std::string_view key) {
  std::string name = "--";
  for (char c : key) name += c == '_' ? '-' : c;
  return name;
}

double typed_quantity(const std::string& text, Dimension dimension, const std::string& where) {
  double number = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), number);
  if (error != std::errc{})
    throw input_error(where, fmt::format("found \"{}\"", text),
                      fmt::format("a number is needed, with a unit or in {}", si_unit(dimension)));
  std::string unit(end, text.data() + text.size());
  unit.erase(0, unit.find_first_not_of(' '));
  return unit.empty() ? number : number * si_factor(unit, dimension, where);
}

double typed_value(const Parameter& parameter, const std::string& typed, std::string_view command) {
  const std::string where = fmt::format("{} {}", command, option_name(parameter.key));
  if (typed.empty() && !parameter.otherwise)
    throw input_error(where, "it is missing", fmt::format("{} is needed", parameter.meaning));
  if (typed.empty()) return *parameter.otherwise;
  return parameter.choices.empty() ? typed_quantity(typed, parameter.dimension, where)
                                   : choice(typed, parameter, where);
}

std::string value_text(const Parameter& parameter, double value) {
  if (!parameter.choices.empty()) return std::string(parameter.choices[static_cast<std::size_t>(value)]);
  if (parameter.dimension == Dimension::none) return fmt::format("{}", value);
  return fmt::format("\"{} {}\"", value, si_unit(parameter.dimension));
}

std::string default_text(const Parameter& parameter) {
  if (!parameter.otherwise) return "required";
  if (!parameter.choices.empty()) return std::string(parameter.choices[static_cast<std::size_t>(*parameter.otherwise)]);
  if (parameter.dimension == Dimension::none) return fmt::format("{:g}", *parameter.otherwise);
  return fmt::format("{:g} {}", *parameter.otherwise, si_unit(parameter.dimension));
}

std::string help_of(const Parameter& parameter) {
  std::string text(parameter.meaning);
  if (parameter.dimension != Dimension::none)
    text += fmt::format(", e.g. \"1.5 {0}\"; a bare number is in {0}", si_unit(parameter.dimension));
  text += parameter.otherwise ? fmt::format(" [{}]", default_text(parameter)) : " (required)";
  const std::string range = allowed_range(parameter);
  return range.empty() ? text : fmt::format("{}; {}", text, range);
}

}  // namespace pilotis
