// Statistics of the peaks of a suite. Pure functions; core/verdict/limit.hpp says what is made of them.
#pragma once

#include <span>
#include <vector>

#include "core/verdict/limit.hpp"

namespace pilotis {

double mean_of(std::span<const double> values);  // NaN of none; infinity when one value is infinite

// Between which order statistics (from 0) the percentile p of n values lies, and how far from the lower to the upper:
// position (n - 1) p / 100. Hyndman & Fan, Sample quantiles in statistical packages, Am. Stat. 50 (1996), type 7.
struct OrderPosition {
  std::size_t lower = 0, upper = 0;
  double fraction = 0;  // 0..1
};
OrderPosition percentile_position(std::size_t n, double percentile);

double percentile_of(std::vector<double> values, double percentile);  // 0..100; NaN of none

// What one run contributes at one place (a story or floor from 1; 1 for whole-run quantities).
struct RunPeak {
  const RunResult* run = nullptr;
  double magnitude = 0;   // SI; infinity for a collapsed run, NaN for one that did not converge
  double step_error = 0;  // SI; NaN unknown
  double recorded = 0;    // SI; magnitude as far as the run went; 0 when nothing was recorded
};

// The magnitude one run reached; `quantity` is a listed one or residual_drift_ratio().
RunPeak run_peak(const StudyResults& results, const RunResult& run, const Quantity& quantity, int place);

// A statistic over the runs at one factor, at one place.
struct SuiteValue {
  double value = 0;       // SI, over completed and collapsed runs; NaN when there is none
  double step_error = 0;  // SI; as Outcome::step_error
  double at_least = 0;    // SI; what the value is at least, whatever the runs not completed would have given
  const RunResult* governing = nullptr;  // with the largest peak; nullptr when there is none
  double recorded = 0;                   // SI, of the governing run; tells collapsed runs apart
  int open = 0;  // runs that gave no value: not converged, or called done with a peak that is no number
};
SuiteValue suite_value(std::span<const RunPeak> peaks, Statistic statistic, double percentile);

// Places a quantity has in an n-story building: n, or 1 for whole-run quantities.
int places_of(const Quantity& quantity, const StudyResults& results);

// The runs at one factor, and the factors in the order they first appear.
std::vector<const RunResult*> runs_at(const StudyResults& results, double factor);
std::vector<double> factors_of(const StudyResults& results);

}  // namespace pilotis
