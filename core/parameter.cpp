#include "core/parameter.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

std::string with_unit(double value, Dimension dimension) {
  return dimension == Dimension::none ? fmt::format("{:g}", value) : fmt::format("{:g} {}", value, si_unit(dimension));
}

bool in_range(const Parameter& p, double value) {
  const bool above = p.least_allowed ? value >= p.least : value > p.least;
  const bool below = p.most_allowed ? value <= p.most : value < p.most;
  return above && below;
}

bool is_place(double value, std::size_t count) {
  return value == std::floor(value) && value >= 0 && value < static_cast<double>(count);
}

}  // namespace

std::string allowed_range(const Parameter& p) {
  if (!p.choices.empty()) return fmt::format("one of {}", fmt::join(p.choices, ", "));
  std::string text;
  if (std::isfinite(p.least))
    text = fmt::format("{} {}", p.least_allowed ? "at least" : "greater than", with_unit(p.least, p.dimension));
  if (p.most < 1e300)  // 1e300 only keeps infinity out
    text += fmt::format("{}{} {}", text.empty() ? "" : " and ", p.most_allowed ? "at most" : "less than",
                        with_unit(p.most, p.dimension));
  return text;
}

void require_allowed(const Parameter& p, double value, const std::string& where) {
  if (!std::isfinite(value)) throw input_error(where, fmt::format("found {}", value), "a finite number is needed");
  if (!p.choices.empty() && !is_place(value, p.choices.size()))
    throw input_error(where, fmt::format("found {:g}", value),
                      fmt::format("{} must be {}", p.meaning, allowed_range(p)));
  if (!in_range(p, value))
    throw input_error(where, fmt::format("found {}", with_unit(value, p.dimension)),
                      fmt::format("{} must be {}", p.meaning, allowed_range(p)));
  if (p.whole && value != std::round(value))
    throw input_error(where, fmt::format("found {:g}", value), fmt::format("{} must be a whole number", p.meaning));
}

}  // namespace pilotis
