#include "core/verdict/memory_table.hpp"

#include <limits>

#include "core/verdict/limit.hpp"

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();

PlaceValue residual_ratio(const RunResult& run, const BuildingSummary& building, std::size_t story) {
  if (story >= run.residual_drift.size()) return {unknown, unknown};
  const double height = building.heights.at(story);
  const double error = story < run.residual_error.size() ? run.residual_error[story] : unknown;
  return {run.residual_drift[story] / height, error / height};
}

PlaceValue peak_at(const RunResult& run, std::size_t at) {
  if (at >= run.peaks.size()) return {unknown, unknown};
  return {run.peaks[at].value, run.peaks[at].step_error};
}

}  // namespace

MemoryTable::MemoryTable(const std::vector<BuildingSummary>& buildings, const std::vector<RunResult>& runs)
    : buildings_(buildings), runs_(runs) {
  for (std::size_t i = 0; i < runs.size(); ++i) {
    add_to_sets(sets_, runs[i].building, runs[i].factor, i);
    statuses_.push_back(runs[i].status);
  }
}

std::span<const PlaceValue> MemoryTable::column(const RunSet& set, const Quantity& quantity, int place) const {
  const BuildingSummary& building = buildings_.at(static_cast<std::size_t>(set.building));
  const std::size_t index = static_cast<std::size_t>(place) - 1;
  const bool residual = &quantity == &residual_drift_ratio();
  const ResponseLayout layout(static_cast<int>(building.heights.size()));
  column_.clear();
  for (std::size_t i = set.first; i < set.first + set.count; ++i)
    column_.push_back(residual ? residual_ratio(runs_[i], building, index)
                               : peak_at(runs_[i], layout.offset(quantity) + index));
  return column_;
}

void MemoryTable::numbers(double RunResult::*member, std::size_t first, std::span<double> into) const {
  for (std::size_t i = 0; i < into.size(); ++i) into[i] = runs_.at(first + i).*member;
}

std::vector<RunResult> MemoryTable::rows(std::size_t first, std::size_t count, RowParts parts) const {
  std::vector<RunResult> found;
  for (std::size_t i = first; i < first + count; ++i) {
    found.push_back(runs_.at(i));
    RunResult& run = found.back();
    run.times.clear();
    run.histories.clear();
    if (parts != RowParts::all) run.peaks.clear();
    if (parts != RowParts::heads) continue;
    run.residual_drift.clear();
    run.residual_swing.clear();
    run.residual_error.clear();
  }
  return found;
}

}  // namespace pilotis
