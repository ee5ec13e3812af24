#include "apps/quantity_text.hpp"

#include <fmt/format.h>

#include <charconv>

#include "core/error.hpp"

namespace pilotis {

double quantity_of(const std::string& text, Dimension dimension, const std::string& where) {
  double number = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), number);
  if (error != std::errc{})
    throw input_error(where, fmt::format("found \"{}\"", text),
                      fmt::format("a number is needed, with a unit or in {}", si_unit(dimension)));
  std::string unit(end, text.data() + text.size());
  unit.erase(0, unit.find_first_not_of(' '));
  return unit.empty() ? number : number * si_factor(unit, dimension, where);
}

}  // namespace pilotis
