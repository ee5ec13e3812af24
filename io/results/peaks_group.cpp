// /peaks and /residual: one value per run and story or floor.
#include <cmath>
#include <limits>

#include "io/results/axes.hpp"
#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();

int stories_of(const StudyResults& results) { return static_cast<int>(results.building.heights.size()); }

// One member of the peaks of one quantity, [run][place]; NaN where a run has none.
std::vector<double> table(const StudyResults& results, const Quantity& quantity, double Peak::*member) {
  const ResponseLayout layout(stories_of(results));
  std::vector<double> values;
  for (const RunResult& run : results.runs)
    for (std::size_t i = 0; i < layout.count(quantity); ++i) {
      const std::size_t at = layout.offset(quantity) + i;
      values.push_back(at < run.peaks.size() ? run.peaks[at].*member : unknown);
    }
  return values;
}

void take(const std::vector<double>& values, StudyResults& results, const Quantity& quantity, double Peak::*member) {
  const ResponseLayout layout(stories_of(results));
  const std::size_t count = layout.count(quantity);
  for (std::size_t run = 0; run < results.runs.size(); ++run)
    for (std::size_t i = 0; i < count; ++i)
      results.runs[run].peaks[layout.offset(quantity) + i].*member = values[run * count + i];
}

// One member of the residuals, [run][story]; NaN where a run has none.
std::vector<double> residual_table(const StudyResults& results, std::vector<double> RunResult::*member) {
  std::vector<double> values;
  for (const RunResult& run : results.runs) {
    std::vector<double> row = run.*member;
    row.resize(results.building.heights.size(), unknown);
    values.insert(values.end(), row.begin(), row.end());
  }
  return values;
}

// A run without residuals is stored as NaN throughout.
void take_residual(const std::vector<double>& values, StudyResults& results, std::vector<double> RunResult::*member) {
  const auto stories = static_cast<std::ptrdiff_t>(results.building.heights.size());
  auto from = values.begin();
  for (RunResult& run : results.runs) {
    (run.*member).assign(from, from + stories);
    from += stories;
  }
}

void drop_unknown_residuals(RunResult& run) {
  for (double drift : run.residual_drift)
    if (!std::isnan(drift)) return;
  run.residual_drift.clear();
  run.residual_swing.clear();
  run.residual_error.clear();
}

}  // namespace

void write_peaks(H5::H5File& file, const StudyResults& results) {
  GroupWriter group(file, "/peaks");
  if (results.runs.empty()) return;
  group.count_scale("run", 0, results.runs.size(), "run, counted from 0");
  write_places(group, stories_of(results));
  for (const Quantity& quantity : quantities()) {
    const std::string name(quantity.name), long_name(quantity.long_name);
    const auto axes = axes_of("run", quantity);
    const auto unit = si_unit(quantity.dimension);
    group.numbers(name, axes, table(results, quantity, &Peak::value), unit, "largest " + long_name);
    group.numbers(name + "_time", axes, table(results, quantity, &Peak::time), "s", "when: " + long_name);
    group.numbers(name + "_step_error", axes, table(results, quantity, &Peak::step_error), unit,
                  "error from the time step, estimated; NaN when not estimated: " + long_name);
  }
}

void read_peaks(const ResultFile& from, StudyResults& results) {
  const GroupReader group(from.file, from.where, "/peaks");
  if (results.runs.empty()) return;
  const ResponseLayout layout(stories_of(results));
  for (RunResult& run : results.runs) run.peaks.resize(layout.size());
  for (const Quantity& quantity : quantities()) {
    const std::string name(quantity.name);
    const std::size_t count = results.runs.size() * layout.count(quantity);
    take(group.numbers(name, count), results, quantity, &Peak::value);
    take(group.numbers(name + "_time", count), results, quantity, &Peak::time);
    take(group.numbers(name + "_step_error", count), results, quantity, &Peak::step_error);
  }
}

void write_residuals(H5::H5File& file, const StudyResults& results) {
  GroupWriter group(file, "/residual");
  if (results.runs.empty()) return;
  group.count_scale("run", 0, results.runs.size(), "run, counted from 0");
  group.count_scale("story", 1, results.building.heights.size(), "story, counted from the ground up");
  const auto drift = residual_table(results, &RunResult::residual_drift);
  auto ratio = drift;
  for (std::size_t i = 0; i < ratio.size(); ++i)
    ratio[i] /= results.building.heights[i % results.building.heights.size()];
  group.numbers("drift", {"run", "story"}, drift, "m", "drift left after the motion: mean over the last period");
  group.numbers("drift_swing", {"run", "story"}, residual_table(results, &RunResult::residual_swing), "m",
                "half the range of the drift over the last period: how still it is");
  group.numbers("drift_step_error", {"run", "story"}, residual_table(results, &RunResult::residual_error), "m",
                "error of the residual drift from the time step, estimated; NaN when not estimated");
  group.numbers("drift_ratio", {"run", "story"}, ratio, "1", "residual drift over story height");
}

void read_residuals(const ResultFile& from, StudyResults& results) {
  const GroupReader group(from.file, from.where, "/residual");
  if (results.runs.empty()) return;
  const std::size_t count = results.runs.size() * results.building.heights.size();
  take_residual(group.numbers("drift", count), results, &RunResult::residual_drift);
  take_residual(group.numbers("drift_swing", count), results, &RunResult::residual_swing);
  take_residual(group.numbers("drift_step_error", count), results, &RunResult::residual_error);
  for (RunResult& run : results.runs) drop_unknown_residuals(run);
}

}  // namespace pilotis
