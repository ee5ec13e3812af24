// One line of JSON per shard, for whoever watches a batch from outside.
#pragma once

#include <filesystem>

#include "apps/batch/march_shards.hpp"

namespace pilotis {

// Appends; several processes may write to one file, each line goes out whole.
class ShardLog {
 public:
  // Without a path nothing is logged. Throws Error (outside) when the file cannot be opened.
  explicit ShardLog(const std::filesystem::path& file);
  ~ShardLog();
  ShardLog(const ShardLog&) = delete;
  ShardLog& operator=(const ShardLog&) = delete;

  // A failure is a run that did not converge or that collapsed. Throws Error (outside) when the disk is full.
  void add(const MarchedShard& shard, const Shard& cut, int rank);

 private:
  std::filesystem::path file_;
  int descriptor_ = -1;
};

// Runs of a shard that did not come to their end.
long failures_in(const std::vector<RunResult>& results);

}  // namespace pilotis
