// The groups of a file that are about runs, while they are written: those of a result file and those of a shard alike.
#pragma once

#include "io/results/groups.hpp"

namespace pilotis {

class ResponseRows {
 public:
  // Makes /runs, /peaks, /residual, /histories for the runs of the file. `buildings` must outlive it.
  ResponseRows(H5::H5File& file, RunRange runs, const Buildings& buildings, HistoryFormat histories);

  // Runs numbered from `first` on.
  void add(H5::H5File& file, std::size_t first, std::span<const RunResult> results);
  // All of another file's.
  void copy(H5::H5File& file, const ResultFile& from, RunRange theirs);

 private:
  RunRange runs_;
  const Buildings& buildings_;
  HistoryFormat histories_;
  RowArrays heads_, peaks_, residuals_;
};

}  // namespace pilotis
