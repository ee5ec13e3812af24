// /peaks and /residual: one value per run and story or floor.
#include <algorithm>
#include <cmath>
#include <limits>

#include "io/results/axes.hpp"
#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();

std::size_t stories_of(const RunResult& run, const Buildings& buildings) {
  return buildings.at(static_cast<std::size_t>(run.building)).heights.size();
}

ResponseLayout layout_of(const RunResult& run, const Buildings& buildings) {
  return ResponseLayout(static_cast<int>(stories_of(run, buildings)));
}

struct PeakArray {
  const char* suffix;
  double Peak::*member;
};
constexpr PeakArray peak_arrays[] = {{"", &Peak::value}, {"_time", &Peak::time}, {"_step_error", &Peak::step_error}};

// One member of the peaks of one quantity, [run][place]; NaN where a run has none.
std::vector<double> table(std::span<const RunResult> results, const Buildings& buildings, const Quantity& quantity,
                          double Peak::*member, std::size_t width) {
  std::vector<double> values(results.size() * width, unknown);
  for (std::size_t r = 0; r < results.size(); ++r) {
    const ResponseLayout layout = layout_of(results[r], buildings);
    const std::size_t at = layout.offset(quantity), count = layout.count(quantity);
    if (at + count > results[r].peaks.size()) continue;
    for (std::size_t i = 0; i < count; ++i) values[r * width + i] = results[r].peaks[at + i].*member;
  }
  return values;
}

void take(const std::vector<double>& values, std::size_t width, const Buildings& buildings, const Quantity& quantity,
          double Peak::*member, std::span<RunResult> results) {
  for (std::size_t r = 0; r < results.size(); ++r) {
    const ResponseLayout layout = layout_of(results[r], buildings);
    const std::size_t at = layout.offset(quantity);
    for (std::size_t i = 0; i < layout.count(quantity); ++i) results[r].peaks[at + i].*member = values[r * width + i];
  }
}

struct ResidualArray {
  const char* name;
  std::vector<double> RunResult::*member;
  bool over_height;
  const char* units;
  const char* long_name;
};
constexpr ResidualArray residual_arrays[] = {
    {"drift", &RunResult::residual_drift, false, "m", "drift left after the motion: mean over the last period"},
    {"drift_swing", &RunResult::residual_swing, false, "m",
     "half the range of the drift over the last period: how still it is"},
    {"drift_step_error", &RunResult::residual_error, false, "m",
     "error of the residual drift from the time step, estimated; NaN when not estimated"},
    {"drift_ratio", &RunResult::residual_drift, true, "1", "residual drift over story height"},
    {"drift_ratio_step_error", &RunResult::residual_error, true, "1",
     "error of the residual drift ratio from the time step, estimated; NaN when not estimated"}};

// [run][story]; NaN where a run has none.
std::vector<double> residual_table(std::span<const RunResult> results, const Buildings& buildings,
                                   const ResidualArray& array, std::size_t width) {
  std::vector<double> values(results.size() * width, unknown);
  for (std::size_t r = 0; r < results.size(); ++r) {
    const std::vector<double>& row = results[r].*array.member;
    const std::vector<double>& heights = buildings.at(static_cast<std::size_t>(results[r].building)).heights;
    for (std::size_t i = 0; i < std::min(row.size(), heights.size()); ++i)
      values[r * width + i] = array.over_height ? row[i] / heights[i] : row[i];
  }
  return values;
}

// A run without residuals is stored as NaN throughout.
void drop_unknown_residuals(RunResult& run) {
  for (double drift : run.residual_drift)
    if (!std::isnan(drift)) return;
  run.residual_drift.clear();
  run.residual_swing.clear();
  run.residual_error.clear();
}

}  // namespace

RowArrays make_peaks(H5::H5File& file, RunRange runs, std::size_t stories) {
  GroupWriter group(file, "/peaks");
  RowArrays arrays;
  if (runs.count == 0) return arrays;
  group.count_scale("run", static_cast<std::int64_t>(runs.first), runs.count, "run, counted from 0");
  write_places(group, stories);
  for (const Quantity& quantity : quantities()) {
    const std::string name(quantity.name), long_name(quantity.long_name);
    const auto axes = axes_of("run", quantity);
    const auto unit = si_unit(quantity.dimension);
    arrays.add(name, group.empty_numbers(name, axes, unit, "largest " + long_name));
    arrays.add(name + "_time", group.empty_numbers(name + "_time", axes, "s", "when: " + long_name));
    arrays.add(name + "_step_error",
               group.empty_numbers(name + "_step_error", axes, unit,
                                   "error from the time step, estimated; NaN when not estimated: " + long_name));
  }
  return arrays;
}

void write_peaks(RowArrays& arrays, std::size_t first, std::span<const RunResult> results, const Buildings& buildings) {
  for (const Quantity& quantity : quantities())
    for (const PeakArray& part : peak_arrays) {
      H5::DataSet& array = arrays.at(std::string(quantity.name) + part.suffix);
      const auto values = table(results, buildings, quantity, part.member, row_width(array));
      write_rows(array, first, std::span<const double>(values));
    }
}

void read_peaks(const ResultFile& from, RunRange all, std::size_t first, const Buildings& buildings,
                std::span<RunResult> results) {
  const GroupReader group(from.file, from.where, "/peaks");
  const std::size_t stories = group.length("story");
  for (RunResult& run : results) run.peaks.resize(layout_of(run, buildings).size());
  for (const Quantity& quantity : quantities()) {
    const std::size_t width = quantity.per == Per::run ? 1 : stories;
    std::vector<double> values(results.size() * width);
    for (const PeakArray& part : peak_arrays) {
      read_rows(group.number_array(std::string(quantity.name) + part.suffix, all.count * width), first, values);
      take(values, width, buildings, quantity, part.member, results);
    }
  }
}

RowArrays make_residuals(H5::H5File& file, RunRange runs, std::size_t stories) {
  GroupWriter group(file, "/residual");
  RowArrays arrays;
  if (runs.count == 0) return arrays;
  group.count_scale("run", static_cast<std::int64_t>(runs.first), runs.count, "run, counted from 0");
  group.count_scale("story", 1, stories, "story, counted from the ground up");
  for (const ResidualArray& array : residual_arrays)
    arrays.add(array.name, group.empty_numbers(array.name, {"run", "story"}, array.units, array.long_name));
  return arrays;
}

void write_residuals(RowArrays& arrays, std::size_t first, std::span<const RunResult> results,
                     const Buildings& buildings) {
  for (const ResidualArray& part : residual_arrays) {
    H5::DataSet& array = arrays.at(part.name);
    const auto values = residual_table(results, buildings, part, row_width(array));
    write_rows(array, first, std::span<const double>(values));
  }
}

void read_residuals(const ResultFile& from, RunRange all, std::size_t first, const Buildings& buildings,
                    std::span<RunResult> results) {
  const GroupReader group(from.file, from.where, "/residual");
  const std::size_t width = group.length("story");
  std::vector<double> values(results.size() * width);
  for (const ResidualArray& part : residual_arrays) {
    if (part.over_height) continue;
    read_rows(group.number_array(part.name, all.count * width), first, values);
    for (std::size_t r = 0; r < results.size(); ++r) {
      const auto row = values.begin() + static_cast<std::ptrdiff_t>(r * width);
      (results[r].*part.member).assign(row, row + static_cast<std::ptrdiff_t>(stories_of(results[r], buildings)));
    }
  }
  for (RunResult& run : results) drop_unknown_residuals(run);
}

}  // namespace pilotis
