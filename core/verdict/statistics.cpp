#include "core/verdict/statistics.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();
constexpr double beyond = std::numeric_limits<double>::infinity();

Peak residual_ratio(const StudyResults& results, const RunResult& run, int place) {
  const std::size_t i = static_cast<std::size_t>(place) - 1;
  if (i >= run.residual_drift.size()) return {unknown, 0, unknown};
  const double height = results.building.heights.at(i);
  const double error = i < run.residual_error.size() ? run.residual_error[i] : unknown;
  return {run.residual_drift[i] / height, run.time_reached, error / height};
}

Peak listed_peak(const StudyResults& results, const RunResult& run, const Quantity& quantity, int place) {
  const ResponseLayout layout(static_cast<int>(results.building.heights.size()));
  const std::size_t at = layout.offset(quantity) + static_cast<std::size_t>(place) - 1;
  return at < run.peaks.size() ? run.peaks[at] : Peak{unknown, 0, unknown};
}

double statistic_of(const std::vector<double>& values, Statistic statistic, double percentile) {
  switch (statistic) {
    case Statistic::mean:
      return mean_of(values);
    case Statistic::max:
      return percentile_of(values, 100);
    case Statistic::median:
      return percentile_of(values, 50);
    case Statistic::percentile:
      return percentile_of(values, percentile);
  }
  return unknown;
}

// The larger error of the runs an order statistic falls on or between; NaN when one of them is unknown.
double order_error(std::vector<RunPeak> peaks, double percentile) {
  std::stable_sort(peaks.begin(), peaks.end(),
                   [](const RunPeak& a, const RunPeak& b) { return a.magnitude < b.magnitude; });
  const OrderPosition at = percentile_position(peaks.size(), percentile);
  const double lower = peaks[at.lower].step_error, upper = peaks[at.upper].step_error;
  if (at.fraction == 0) return lower;
  if (std::isnan(lower) || std::isnan(upper)) return unknown;
  return std::max(lower, upper);
}

double statistic_error(const std::vector<RunPeak>& peaks, Statistic statistic, double percentile) {
  switch (statistic) {
    case Statistic::mean: {
      double sum = 0;
      for (const RunPeak& peak : peaks) sum += peak.step_error;
      return sum / static_cast<double>(peaks.size());
    }
    case Statistic::max:
      return order_error(peaks, 100);
    case Statistic::median:
      return order_error(peaks, 50);
    case Statistic::percentile:
      return order_error(peaks, percentile);
  }
  return unknown;
}

// Larger peak first; among collapsed runs the one that had gone further.
bool governs(const RunPeak& a, const RunPeak& b) {
  if (a.magnitude != b.magnitude) return a.magnitude > b.magnitude;
  return a.recorded > b.recorded;
}

}  // namespace

double mean_of(std::span<const double> values) {
  if (values.empty()) return unknown;
  return std::accumulate(values.begin(), values.end(), 0.0) / static_cast<double>(values.size());
}

OrderPosition percentile_position(std::size_t n, double percentile) {
  const double position = static_cast<double>(n - 1) * percentile / 100;
  const double whole = std::floor(position);
  const std::size_t lower = std::min(static_cast<std::size_t>(whole), n - 1);
  return {lower, std::min(lower + 1, n - 1), position - whole};
}

double percentile_of(std::vector<double> values, double percentile) {
  if (values.empty()) return unknown;
  std::sort(values.begin(), values.end());
  const OrderPosition at = percentile_position(values.size(), percentile);
  const double lower = values[at.lower], upper = values[at.upper];
  // Not lower + fraction (upper - lower) where that is infinity minus infinity or 0 times infinity.
  if (at.fraction == 0 || lower == upper) return lower;
  return lower + at.fraction * (upper - lower);
}

RunPeak run_peak(const StudyResults& results, const RunResult& run, const Quantity& quantity, int place) {
  const bool residual = &quantity == &residual_drift_ratio();
  const Peak peak = residual ? residual_ratio(results, run, place) : listed_peak(results, run, quantity, place);
  RunPeak found{&run, std::abs(peak.value), peak.step_error, std::isfinite(peak.value) ? std::abs(peak.value) : 0};
  if (run.status == RunStatus::done) return found;
  found.magnitude = run.status == RunStatus::collapsed ? beyond : unknown;
  found.step_error = unknown;
  return found;
}

SuiteValue suite_value(std::span<const RunPeak> peaks, Statistic statistic, double percentile) {
  std::vector<RunPeak> known;
  std::vector<double> values, at_least;
  for (const RunPeak& peak : peaks) {
    const bool is_known = !std::isnan(peak.magnitude);
    at_least.push_back(is_known ? peak.magnitude : 0);
    if (!is_known) continue;
    known.push_back(peak);
    values.push_back(peak.magnitude);
  }
  SuiteValue suite{unknown, unknown, statistic_of(at_least, statistic, percentile), nullptr, 0, 0};
  suite.open = static_cast<int>(peaks.size() - known.size());
  if (known.empty()) return suite;
  suite.value = statistic_of(values, statistic, percentile);
  suite.step_error = std::isfinite(suite.value) ? statistic_error(known, statistic, percentile) : unknown;
  const RunPeak& largest = *std::min_element(known.begin(), known.end(), governs);
  suite.governing = largest.run;
  suite.recorded = largest.recorded;
  return suite;
}

int places_of(const Quantity& quantity, const StudyResults& results) {
  return quantity.per == Per::run ? 1 : static_cast<int>(results.building.heights.size());
}

std::vector<const RunResult*> runs_at(const StudyResults& results, double factor) {
  std::vector<const RunResult*> found;
  for (const RunResult& run : results.runs)
    if (run.factor == factor) found.push_back(&run);
  return found;
}

std::vector<double> factors_of(const StudyResults& results) {
  std::vector<double> found;
  for (const RunResult& run : results.runs)
    if (std::find(found.begin(), found.end(), run.factor) == found.end()) found.push_back(run.factor);
  return found;
}

}  // namespace pilotis
