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

Placed governing_place(const StudyResults& results, const std::vector<const RunResult*>& runs, const Limit& limit) {
  Placed worst;
  double at_least = 0;
  int open = 0;
  for (int place = 1; place <= places_of(*limit.quantity, results); ++place) {
    std::vector<RunPeak> peaks;
    for (const RunResult* run : runs) peaks.push_back(run_peak(results, *run, *limit.quantity, place));
    const SuiteValue suite = suite_value(peaks, limit.statistic, limit.percentile);
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

void count(const RunResult& run, int& runs, int& collapsed, int& not_converged) {
  ++runs;
  collapsed += run.status == RunStatus::collapsed;
  not_converged += run.status == RunStatus::not_converged;
}

Outcome outcome_of(const StudyResults& results, const Limit& limit, int index, double factor) {
  Outcome outcome;
  outcome.limit = index;
  outcome.factor = factor;
  const auto runs = runs_at(results, factor);
  for (const RunResult* run : runs) count(*run, outcome.runs, outcome.collapsed, outcome.not_converged);
  const Placed worst = governing_place(results, runs, limit);
  outcome.value = worst.suite.value;
  outcome.step_error = worst.suite.step_error;
  outcome.place = limit.quantity->per == Per::run || std::isnan(outcome.value) ? 0 : worst.place;
  if (worst.suite.governing) outcome.motion = worst.suite.governing->motion;
  outcome.margin = (limit.value - outcome.value) / limit.value;
  outcome.exceeded = outcome.value > limit.value;
  outcome.finding = finding_of(worst.suite, limit.value);
  return outcome;
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

Verdict judge(const StudyResults& results, const std::vector<Limit>& limits) {
  Verdict verdict;
  for (const RunResult& run : results.runs) count(run, verdict.runs, verdict.collapsed, verdict.not_converged);
  for (std::size_t i = 0; i < limits.size(); ++i) {
    const auto factors = limits[i].factors.empty() ? factors_of(results) : limits[i].factors;
    for (double factor : factors)
      verdict.outcomes.push_back(outcome_of(results, limits[i], static_cast<int>(i), factor));
  }
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
