// Where judging and showing take the runs of a study from, however many there are: a source that is asked for one
// column or a few rows at a time. core/verdict/memory_table.hpp has them in memory, io/results/result_table.hpp in a
// file.
#pragma once

#include <span>
#include <string>
#include <vector>

#include "core/response/results.hpp"

namespace pilotis {

// The runs of one building at one factor: they follow each other.
struct RunSet {
  int building = 0;  // index into buildings()
  double factor = 1;
  std::size_t first = 0, count = 0;  // runs, counted from 0
};

// What one run gave of one quantity at one place.
struct PlaceValue {
  double value = 0;       // SI, with its sign; NaN: nothing was recorded
  double step_error = 0;  // SI, >= 0; NaN: not estimated
};

// What of a run is read beside its head (all that is one value per run).
enum class RowParts { heads, residuals, all };  // all: peaks and residuals

// For one thread at a time: columns are read into a buffer of the table.
class RunTable {
 public:
  virtual ~RunTable() = default;

  virtual const std::vector<BuildingSummary>& buildings() const = 0;  // file: without their matrices
  virtual const std::vector<RunSet>& sets() const = 0;                // in the order of the runs
  virtual std::span<const RunStatus> statuses() const = 0;            // [run]
  virtual const std::string& motion(std::size_t run) const = 0;       // its name

  // [run of the set]: peaks of a listed quantity, or residual_drift_ratio(); `place` is a story or floor from 1, 1 for
  // whole-run quantities. Valid until the next call.
  virtual std::span<const PlaceValue> column(const RunSet& set, const Quantity& quantity, int place) const = 0;

  // One number of each of into.size() runs from `first` on: a double of RunResult, e.g. &RunResult::step.
  virtual void numbers(double RunResult::*member, std::size_t first, std::span<double> into) const = 0;

  // `count` runs from `first` on, without histories. A run without residuals has none.
  virtual std::vector<RunResult> rows(std::size_t first, std::size_t count, RowParts parts) const = 0;

  std::size_t runs() const { return statuses().size(); }
  // The set of a building at a factor; of no runs when there is none.
  RunSet set_of(int building, double factor) const;
  // Factors of one building, in the order of its runs.
  std::vector<double> factors_of(int building) const;
};

// Run `run`, the one after those in `sets`, joins the last set when that is its own and opens a new one when not.
void add_to_sets(std::vector<RunSet>& sets, int building, double factor, std::size_t run);

}  // namespace pilotis
