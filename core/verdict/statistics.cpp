#include "core/verdict/statistics.hpp"

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <limits>
#include <utility>
#include <vector>

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();
constexpr double beyond = std::numeric_limits<double>::infinity();

double magnitude(const SuiteColumn& column, std::size_t i) {
  if (column.statuses[i] == RunStatus::collapsed) return beyond;
  return column.statuses[i] == RunStatus::done ? std::abs(column.values[i].value) : unknown;
}

double step_error(const SuiteColumn& column, std::size_t i) {
  return column.statuses[i] == RunStatus::done ? column.values[i].step_error : unknown;
}

// As far as the run went; 0 when nothing was recorded.
double recorded(const SuiteColumn& column, std::size_t i) {
  const double value = std::abs(column.values[i].value);
  return std::isfinite(value) ? value : 0;
}

// Fills governing, recorded and open. Larger peak first; among collapsed runs the one that had gone further.
void find_governing(const SuiteColumn& column, SuiteValue& suite) {
  double largest = unknown;
  for (std::size_t i = 0; i < column.values.size(); ++i) {
    const double here = magnitude(column, i), reached = recorded(column, i);
    if (std::isnan(here)) {
      ++suite.open;
      continue;
    }
    const bool governs = !suite.governing || here > largest || (here == largest && reached > suite.recorded);
    if (!governs) continue;
    largest = here;
    suite.governing = i;
    suite.recorded = reached;
  }
}

void take_mean(const SuiteColumn& column, SuiteValue& suite) {
  double sum = 0, errors = 0;
  for (std::size_t i = 0; i < column.values.size(); ++i) {
    const double here = magnitude(column, i);
    if (std::isnan(here)) continue;
    sum += here;
    errors += step_error(column, i);
  }
  const auto all = static_cast<double>(column.values.size()), known = all - suite.open;
  suite.value = sum / known;
  suite.step_error = errors / known;
  suite.at_least = sum / all;
}

// The known magnitudes with their runs, to be put in order as far as an order statistic needs it.
class Ranks {
 public:
  explicit Ranks(const SuiteColumn& column) {
    ranks_.reserve(column.values.size());
    for (std::size_t i = 0; i < column.values.size(); ++i)
      if (const double here = magnitude(column, i); !std::isnan(here))
        ranks_.emplace_back(here, static_cast<std::uint32_t>(i));
  }
  std::size_t size() const { return ranks_.size(); }

  // Magnitude and run of the k-th smallest, from 0.
  std::pair<double, std::uint32_t> at(std::size_t k) {
    std::nth_element(ranks_.begin(), ranks_.begin() + static_cast<std::ptrdiff_t>(k), ranks_.end());
    return ranks_[k];
  }

 private:
  std::vector<std::pair<double, std::uint32_t>> ranks_;
};

// Not lower + fraction (upper - lower) where that is infinity minus infinity or 0 times infinity.
double between(double lower, double upper, double fraction) {
  return fraction == 0 || lower == upper ? lower : lower + fraction * (upper - lower);
}

// With the open runs as so many zeros below the known ones.
double percentile_at_least(Ranks& ranks, std::size_t open, double percentile) {
  const OrderPosition at = percentile_position(ranks.size() + open, percentile);
  const auto value = [&](std::size_t k) { return k < open ? 0.0 : ranks.at(k - open).first; };
  return between(value(at.lower), value(at.upper), at.fraction);
}

void take_percentile(const SuiteColumn& column, double percentile, SuiteValue& suite) {
  Ranks ranks(column);
  const OrderPosition at = percentile_position(ranks.size(), percentile);
  const auto lower = ranks.at(at.lower), upper = ranks.at(at.upper);
  suite.value = between(lower.first, upper.first, at.fraction);
  suite.at_least =
      suite.open > 0 ? percentile_at_least(ranks, static_cast<std::size_t>(suite.open), percentile) : suite.value;
  const double below = step_error(column, lower.second), above = step_error(column, upper.second);
  if (at.fraction == 0)
    suite.step_error = below;
  else
    suite.step_error = std::isnan(below) || std::isnan(above) ? unknown : std::max(below, above);
}

void take_largest(const SuiteColumn& column, SuiteValue& suite) {
  suite.value = suite.at_least = magnitude(column, *suite.governing);
  suite.step_error = step_error(column, *suite.governing);
}

}  // namespace

OrderPosition percentile_position(std::size_t n, double percentile) {
  const double position = static_cast<double>(n - 1) * percentile / 100;
  const double whole = std::floor(position);
  const std::size_t lower = std::min(static_cast<std::size_t>(whole), n - 1);
  return {lower, std::min(lower + 1, n - 1), position - whole};
}

SuiteColumn suite_column(const RunTable& table, const RunSet& set, const Quantity& quantity, int place) {
  return {table.column(set, quantity, place), table.statuses().subspan(set.first, set.count)};
}

SuiteValue suite_value(const SuiteColumn& column, Statistic statistic, double percentile) {
  SuiteValue suite{unknown, unknown, 0, {}, 0, 0};
  find_governing(column, suite);
  if (!suite.governing) return suite;
  switch (statistic) {
    case Statistic::mean:
      take_mean(column, suite);
      break;
    case Statistic::max:
      take_largest(column, suite);
      break;
    case Statistic::median:
      take_percentile(column, 50, suite);
      break;
    case Statistic::percentile:
      take_percentile(column, percentile, suite);
      break;
  }
  if (!std::isfinite(suite.value)) suite.step_error = unknown;
  return suite;
}

DoneValue done_value(const SuiteColumn& column) {
  DoneValue found{unknown, unknown, unknown, {}};
  double sum = 0;
  int known = 0;
  for (std::size_t i = 0; i < column.values.size(); ++i) {
    const double here = std::abs(column.values[i].value);
    if (column.statuses[i] != RunStatus::done || std::isnan(here)) continue;
    sum += here;
    ++known;
    if (!found.run || here > found.largest) found.run = i, found.largest = here;
  }
  if (!found.run) return found;
  found.step_error = column.values[*found.run].step_error;
  found.mean = sum / known;
  return found;
}

int places_of(const Quantity& quantity, const BuildingSummary& building) {
  return quantity.per == Per::run ? 1 : static_cast<int>(building.heights.size());
}

}  // namespace pilotis
