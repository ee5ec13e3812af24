// The runs of an open result file as a RunTable.
#pragma once

#include <cstdint>
#include <map>
#include <unordered_map>

#include "core/verdict/run_table.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

// Throws Error (input) and H5::Exception.
class FileRuns : public RunTable {
 public:
  // `buildings` must outlive it.
  FileRuns(ResultFile from, const Buildings& buildings);

  const ResultFile& file() const { return from_; }
  const Buildings& buildings() const override { return buildings_; }
  const std::vector<RunSet>& sets() const override { return sets_; }
  std::span<const RunStatus> statuses() const override { return statuses_; }
  const std::string& motion(std::size_t run) const override { return motion_names_[motions_.at(run)]; }
  std::span<const PlaceValue> column(const RunSet& set, const Quantity& quantity, int place) const override;
  void numbers(double RunResult::*member, std::size_t first, std::span<double> into) const override;
  std::vector<RunResult> rows(std::size_t first, std::size_t count, RowParts parts) const override;

 private:
  // The columns last read: some places of one quantity for some runs, [place][run].
  struct Block {
    const Quantity* quantity = nullptr;
    std::size_t first_run = 0, runs = 0, first_place = 0, places = 0;
    std::vector<PlaceValue> values;
  };

  void read_heads();
  void choose_block(const RunSet& set, const Quantity& quantity, std::size_t place) const;
  void read_block() const;
  const H5::DataSet& array(const std::string& group, const std::string& name, std::size_t width) const;

  ResultFile from_;
  const Buildings& buildings_;
  std::size_t count_ = 0, stories_ = 0;
  std::vector<RunSet> sets_;
  std::vector<RunStatus> statuses_;
  std::vector<std::uint32_t> motions_;  // [run], index into motion_names_
  std::vector<std::string> motion_names_;
  mutable std::map<std::string, H5::DataSet> arrays_;  // opened so far
  mutable Block block_;
};

}  // namespace pilotis
