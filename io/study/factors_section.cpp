#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <functional>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

constexpr Parameter suite_factor{"factors", Dimension::none, "a factor of the suite", {}, 0.0, 1e300, false};

constexpr double most_factors = 1e5;

std::vector<double> listed(const ValueReader& value) {
  std::vector<double> factors;
  for (const ValueReader& item : value.items()) {
    factors.push_back(item.quantity(suite_factor));
    if (std::count(factors.begin(), factors.end(), factors.back()) > 1)
      throw item.wrong(fmt::format("found the factor {:g} a second time", factors.back()), "give each factor once");
  }
  if (factors.empty()) throw value.wrong("found an empty list", "give a factor, or leave the key out for [1.0]");
  return factors;
}

Parameter end(std::string_view key, std::string_view meaning) {
  return {key, Dimension::none, meaning, {}, 0.0, 1e300, false};
}

// Ends as they are given; between them equal steps, or equal ratios.
std::vector<double> spaced(double from, double to, int count, bool equal_ratios) {
  std::vector<double> factors;
  for (int i = 0; i < count; ++i) {
    const double part = static_cast<double>(i) / (count - 1);
    factors.push_back(equal_ratios ? from * std::pow(to / from, part) : std::lerp(from, to, part));
  }
  factors.back() = to;
  return factors;
}

std::vector<double> range(TableReader table) {
  table.known_keys({"from", "to", "count", "spacing"});
  const double from = table.quantity(end("from", "the least factor"));
  const double to = table.quantity(end("to", "the largest factor"));
  if (!(to > from))
    throw table.at("to", "").wrong(fmt::format("found {:g}, from {:g}", to, from), "it must be greater than from");
  const auto count =
      static_cast<int>(table.quantity(whole_number("count", "how many factors, both ends included,", 2, most_factors)));
  const std::array<std::string_view, 2> spacings{"linear", "log"};
  const auto spacing = table.find("spacing");
  const bool equal_ratios = spacing && spacing->choice("spacing", spacings) == "log";
  const std::vector<double> factors = spaced(from, to, count, equal_ratios);
  if (std::adjacent_find(factors.begin(), factors.end(), std::greater_equal<>()) != factors.end())
    throw table.at("count", "")
        .wrong(fmt::format("found {} factors from {:g} to {:g}", count, from, to),
               "they would not be different numbers: give fewer, or a wider range");
  return factors;
}

}  // namespace

std::vector<double> read_factors(const TableReader& suite) {
  const auto value = suite.find("factors");
  if (!value) return {1.0};
  if (value->node().kind == NodeKind::table) return range(TableReader(*value));
  if (value->node().kind == NodeKind::array) return listed(*value);
  throw value->wrong_type("a list such as [0.5, 1.0] or a range { from = 0.1, to = 2.0, count = 20 } is needed");
}

}  // namespace pilotis
