// Statistics of the peaks of a suite. Pure functions; core/verdict/limit.hpp says what is made of them.
#pragma once

#include <optional>
#include <span>

#include "core/verdict/limit.hpp"
#include "core/verdict/run_table.hpp"

namespace pilotis {

// Between which order statistics (from 0) the percentile p of n >= 1 values lies, and how far from the lower to the
// upper: position (n - 1) p / 100. Hyndman & Fan, Sample quantiles in statistical packages, Am. Stat. 50 (1996),
// type 7.
struct OrderPosition {
  std::size_t lower = 0, upper = 0;
  double fraction = 0;  // 0..1
};
OrderPosition percentile_position(std::size_t n, double percentile);

// What the runs of one set gave at one place, and how each ended. The magnitude that counts is |value| of a run that
// was done, infinity of one that collapsed, unknown of one that did not converge.
struct SuiteColumn {
  std::span<const PlaceValue> values;
  std::span<const RunStatus> statuses;
};
// Valid until the next column is taken from the table.
SuiteColumn suite_column(const RunTable& table, const RunSet& set, const Quantity& quantity, int place);

// A statistic over the runs of a set, at one place.
struct SuiteValue {
  double value = 0;       // SI, over completed and collapsed runs; NaN when there is none
  double step_error = 0;  // SI; as Outcome::step_error
  double at_least = 0;    // SI; what the value is at least, whatever the runs not completed would have given
  std::optional<std::size_t> governing;  // run of the set with the largest peak
  double recorded = 0;  // SI, of the governing run; tells collapsed runs apart; 0 when it recorded none
  int open = 0;         // runs that gave no value: not converged, or called done with a peak that is no number
};
// percentile: 0..100. Memory: 16 bytes a run for median and percentile.
SuiteValue suite_value(const SuiteColumn& column, Statistic statistic, double percentile);

// The runs of the set that were done, alone.
struct DoneValue {
  double largest = 0;              // SI; NaN when there is none
  double step_error = 0;           // SI, of the largest; NaN: unknown
  double mean = 0;                 // SI
  std::optional<std::size_t> run;  // of the set, with the largest
};
DoneValue done_value(const SuiteColumn& column);

// Places a quantity has in a building: its stories, or 1 for whole-run quantities.
int places_of(const Quantity& quantity, const BuildingSummary& building);

}  // namespace pilotis
