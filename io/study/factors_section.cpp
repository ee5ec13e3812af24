#include <fmt/format.h>

#include <algorithm>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

constexpr Parameter suite_factor{"factors", Dimension::none, "a factor of the suite", {}, 0.0, 1e300, false};

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

}  // namespace

std::vector<double> read_factors(const TableReader& suite) {
  const auto value = suite.find("factors");
  if (!value) return {1.0};
  return listed(*value);
}

}  // namespace pilotis
