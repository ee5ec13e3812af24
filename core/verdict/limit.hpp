// Limits against responses.
#pragma once

#include <string>
#include <vector>

#include "core/response/results.hpp"
#include "core/verdict/run_table.hpp"

namespace pilotis {

enum class Statistic { mean, max, median, percentile };

// What the suite's peaks of one quantity may reach at most.
struct Limit {
  const Quantity* quantity = nullptr;  // a listed one, or residual_drift_quantity()
  Statistic statistic = Statistic::max;
  double percentile = 0;        // 0..100, for Statistic::percentile
  double value = 0;             // SI, > 0; held against the magnitude of the peaks
  std::string source;           // where the limit comes from, as the user states it
  std::vector<double> factors;  // which factors it is for; empty: all of the study
};

// |residual drift| / height after the tail: not a peak, but limits may name it: "residual_drift_ratio".
const Quantity& residual_drift_ratio();

enum class Finding {
  holds,
  exceeded,
  too_close,    // the value is within its step error of the limit, on either side
  undetermined  // runs that did not converge leave it open
};

// One limit for one building at one factor. "Place" is the story or floor (from 1) where the statistic is largest; 0
// for whole-run quantities.
struct Outcome {
  int limit = 0;     // index into the limits
  int building = 0;  // index into the study's buildings
  double factor = 1;
  double value = 0;  // SI; infinity when collapsed runs decide it
  // SI, of the statistic: mean of the errors for a mean, the governing run's for max, the larger error of the runs it
  // falls between for median and percentile; NaN: unknown.
  double step_error = 0;
  int place = 0;
  std::string motion;  // with the largest peak at that place
  double margin = 0;   // (limit - value) / limit
  // Of that building at that factor: all runs; those that collapsed; those not completed.
  int runs = 0, collapsed = 0, not_converged = 0;
  bool exceeded = false;  // the plain comparison value > limit
  Finding finding = Finding::holds;
};

struct Verdict {
  std::vector<Outcome> outcomes;
  int runs = 0, collapsed = 0, not_converged = 0;
  bool any_exceeded() const;
};

// A collapsed run counts as beyond every limit; a run that did not converge leaves a limit undetermined unless the
// others already exceed it: whatever it would have given (0 or more), the statistic of all is above the limit. The
// value shown is that of the runs that gave one. A factor without runs is undetermined. Percentile: linear
// interpolation between order statistics (Hyndman & Fan 1996, type 7).
// Each building is judged by itself at each of its factors: outcomes by limit, then building, then factor. Memory: one
// column of the table and its ranks.
Verdict judge(const RunTable& table, const std::vector<Limit>& limits);

// 0 all hold, 1 a limit is exceeded or a run collapsed, 3 a run was not completed or a limit is undetermined.
int exit_status(const Verdict& verdict);

std::string_view statistic_name(Statistic statistic);
std::string_view finding_name(Finding finding);

}  // namespace pilotis
