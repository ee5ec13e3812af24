#include "core/verdict/limit.hpp"

#include <algorithm>
#include <cmath>

#include "core/verdict/statistics.hpp"

namespace pilotis {

namespace {

struct Placed {
  int place = 0;
  SuiteValue suite;
};

// Larger value first; where collapsed runs make several places infinite, the one that had gone furthest.
bool further(const SuiteValue& a, const SuiteValue& b) {
  if (std::isnan(b.value)) return !std::isnan(a.value);
  if (a.value != b.value) return a.value > b.value;
  return std::isinf(a.value) && a.recorded > b.recorded;
}

Placed governing_place(const RunTable& table, const RunSet& set, const Limit& limit) {
  const BuildingSummary& building = table.buildings().at(static_cast<std::size_t>(set.building));
  Placed worst;
  double at_least = 0;
  int open = 0;
  for (int place = 1; place <= places_of(*limit.quantity, building); ++place) {
    const SuiteValue suite =
        suite_value(suite_column(table, set, *limit.quantity, place), limit.statistic, limit.percentile);
    at_least = std::fmax(at_least, suite.at_least);
    open = std::max(open, suite.open);
    if (worst.place == 0 || further(suite, worst.suite)) worst = {place, suite};
  }
  worst.suite.at_least = at_least;
  worst.suite.open = open;
  return worst;
}

Finding finding_of(const SuiteValue& suite, double limit) {
  const bool open = suite.open > 0 || std::isnan(suite.value);
  if (open && !(suite.at_least > limit)) return Finding::undetermined;
  if (std::abs(suite.value - limit) <= suite.step_error) return Finding::too_close;
  return suite.value > limit ? Finding::exceeded : Finding::holds;
}

void count(std::span<const RunStatus> statuses, int& runs, int& collapsed, int& not_converged) {
  for (RunStatus status : statuses) {
    ++runs;
    collapsed += status == RunStatus::collapsed;
    not_converged += status == RunStatus::not_converged;
  }
}

Outcome outcome_of(const RunTable& table, const RunSet& set, const Limit& limit, std::size_t index) {
  Outcome outcome;
  outcome.limit = static_cast<int>(index);
  outcome.building = set.building;
  outcome.factor = set.factor;
  count(table.statuses().subspan(set.first, set.count), outcome.runs, outcome.collapsed, outcome.not_converged);
  const Placed worst = governing_place(table, set, limit);
  outcome.value = worst.suite.value;
  outcome.step_error = worst.suite.step_error;
  outcome.place = limit.quantity->per == Per::run || std::isnan(outcome.value) ? 0 : worst.place;
  if (worst.suite.governing) outcome.motion = table.motion(set.first + *worst.suite.governing);
  outcome.margin = (limit.value - outcome.value) / limit.value;
  outcome.exceeded = outcome.value > limit.value;
  outcome.finding = finding_of(worst.suite, limit.value);
  return outcome;
}

// The sets a limit is for; one of no runs where a building has none at a factor the limit names.
std::vector<RunSet> sets_for(const RunTable& table, const Limit& limit) {
  if (limit.factors.empty()) return table.sets();
  std::vector<RunSet> sets;
  for (std::size_t building = 0; building < table.buildings().size(); ++building)
    for (double factor : limit.factors) sets.push_back({static_cast<int>(building), factor, 0, 0});
  for (const RunSet& set : table.sets())
    for (std::size_t i = 0; i < limit.factors.size(); ++i)
      if (limit.factors[i] == set.factor) sets[set.building * limit.factors.size() + i] = set;
  return sets;
}

}  // namespace

const Quantity& residual_drift_ratio() {
  static constexpr Quantity quantity{"residual_drift_ratio", Per::story, Dimension::none,
                                     "interstory drift left after the motion, over story height"};
  return quantity;
}

bool Verdict::any_exceeded() const {
  for (const Outcome& outcome : outcomes)
    if (outcome.exceeded) return true;
  return false;
}

Verdict judge(const RunTable& table, const std::vector<Limit>& limits) {
  Verdict verdict;
  count(table.statuses(), verdict.runs, verdict.collapsed, verdict.not_converged);
  for (std::size_t i = 0; i < limits.size(); ++i)
    for (const RunSet& set : sets_for(table, limits[i]))
      verdict.outcomes.push_back(outcome_of(table, set, limits[i], i));
  return verdict;
}

int exit_status(const Verdict& verdict) {
  if (verdict.not_converged > 0) return 3;
  for (const Outcome& outcome : verdict.outcomes)
    if (outcome.finding == Finding::undetermined) return 3;
  return verdict.any_exceeded() || verdict.collapsed > 0 ? 1 : 0;
}

std::string_view statistic_name(Statistic statistic) {
  switch (statistic) {
    case Statistic::mean:
      return "mean";
    case Statistic::max:
      return "max";
    case Statistic::median:
      return "median";
    case Statistic::percentile:
      return "percentile";
  }
  return "";
}

std::string_view finding_name(Finding finding) {
  switch (finding) {
    case Finding::holds:
      return "holds";
    case Finding::exceeded:
      return "exceeded";
    case Finding::too_close:
      return "too close";
    case Finding::undetermined:
      return "undetermined";
  }
  return "";
}

}  // namespace pilotis
