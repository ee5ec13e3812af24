#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>
#include <array>
#include <cmath>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

constexpr Parameter percentile{"percentile", Dimension::none, "the percentile", {}, 0.0, 100.0};
constexpr Parameter factor{"factors", Dimension::none, "a factor", {}, 0.0, 1e300, false};

struct NamedStatistic {
  std::string_view name;
  Statistic statistic;
};
constexpr std::array<NamedStatistic, 4> statistics{{{"mean", Statistic::mean},
                                                    {"max", Statistic::max},
                                                    {"median", Statistic::median},
                                                    {"percentile", Statistic::percentile}}};

const Quantity& limited_quantity(const ValueReader& value) {
  std::vector<std::string_view> names = quantity_names();
  names.push_back(residual_drift_ratio().name);
  const std::string name = value.choice("quantity", names);
  const Quantity* listed = find_quantity(name);
  return listed != nullptr ? *listed : residual_drift_ratio();
}

Statistic read_statistic(const ValueReader& value) {
  std::vector<std::string_view> names;
  for (const NamedStatistic& entry : statistics) names.push_back(entry.name);
  const std::string name = value.choice("statistic", names);
  return std::find_if(statistics.begin(), statistics.end(), [&](const auto& s) { return s.name == name; })->statistic;
}

double read_percentile(const TableReader& table, Statistic statistic) {
  const auto given = table.find("percentile");
  if (statistic == Statistic::percentile) return table.quantity(percentile);
  if (given) throw given->wrong("found a percentile with another statistic", "write statistic = \"percentile\"");
  return 0;
}

bool same_factor(double a, double b) { return std::abs(a - b) <= 1e-12 * std::abs(b); }

// The study's own factors among which the limit holds, as the study has them.
std::vector<double> read_limit_factors(const ValueReader& value, const std::vector<double>& factors) {
  std::vector<double> chosen;
  for (const ValueReader& item : value.items()) {
    const double wanted = item.quantity(factor);
    const auto found = std::find_if(factors.begin(), factors.end(), [&](double f) { return same_factor(wanted, f); });
    if (found == factors.end())
      throw item.wrong(fmt::format("found {:g}, which is not a factor of this study", wanted),
                       fmt::format("allowed: {}", fmt::join(factors, ", ")));
    chosen.push_back(*found);
  }
  if (chosen.empty()) throw value.wrong("found an empty list", "name a factor, or leave the key out for all of them");
  return chosen;
}

Limit read_limit(TableReader table, const std::vector<double>& factors) {
  table.known_keys({"quantity", "statistic", "percentile", "value", "source", "factors"});
  Limit limit;
  limit.quantity = &limited_quantity(table.at("quantity", "name what is limited, such as \"drift_ratio\""));
  limit.statistic = read_statistic(table.at("statistic", "say over the motions what: mean, max, median or percentile"));
  limit.percentile = read_percentile(table, limit.statistic);
  limit.value = table.quantity({"value", limit.quantity->dimension, "the limit", {}, 0.0, 1e300, false});
  limit.source = table.text("source", "say where the limit comes from, such as the code and its section");
  if (const auto chosen = table.find("factors")) limit.factors = read_limit_factors(*chosen, factors);
  return limit;
}

}  // namespace

std::vector<std::string_view> quantity_names() {
  std::vector<std::string_view> names;
  for (const Quantity& quantity : quantities()) names.push_back(quantity.name);
  return names;
}

std::vector<Limit> read_limits(const TableReader& root, const std::vector<double>& factors) {
  std::vector<Limit> limits;
  for (const TableReader& table : root.tables("limit")) limits.push_back(read_limit(table, factors));
  return limits;
}

}  // namespace pilotis
