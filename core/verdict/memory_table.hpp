// The runs of a study as a RunTable over results in memory: for few runs.
#pragma once

#include "core/verdict/run_table.hpp"

namespace pilotis {

class MemoryTable : public RunTable {
 public:
  // Both must outlive the table.
  MemoryTable(const std::vector<BuildingSummary>& buildings, const std::vector<RunResult>& runs);

  const std::vector<BuildingSummary>& buildings() const override { return buildings_; }
  const std::vector<RunSet>& sets() const override { return sets_; }
  std::span<const RunStatus> statuses() const override { return statuses_; }
  const std::string& motion(std::size_t run) const override { return runs_[run].motion; }
  std::span<const PlaceValue> column(const RunSet& set, const Quantity& quantity, int place) const override;
  void numbers(double RunResult::*member, std::size_t first, std::span<double> into) const override;
  std::vector<RunResult> rows(std::size_t first, std::size_t count, RowParts parts) const override;

 private:
  const std::vector<BuildingSummary>& buildings_;
  const std::vector<RunResult>& runs_;
  std::vector<RunSet> sets_;
  std::vector<RunStatus> statuses_;
  mutable std::vector<PlaceValue> column_;
};

}  // namespace pilotis
