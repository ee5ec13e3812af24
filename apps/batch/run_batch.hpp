// A whole batch, from its plan to a result file: shards marched by threads and ranks, kept as they are done, put
// together at the end. What a killed process left whole is not marched again.
#pragma once

#include <filesystem>
#include <functional>

#include "apps/batch/job.hpp"
#include "apps/batch/plan.hpp"

namespace pilotis {

struct BatchOptions {
  std::filesystem::path output;  // result file
  std::filesystem::path log;     // one line a shard; empty: none
  int threads = 1;               // that march, in this process
  bool quiet = false;            // no progress on standard error
};

struct BatchEnd {
  bool whole = false;  // the result file is in place; false: stopped by Ctrl-C or a polite kill
  // When not whole: shards that are kept, and whether starting again goes on from there.
  std::size_t shards_kept = 0, runs_kept = 0;
  bool goes_on = false;
  std::filesystem::path folder;  // of the shards
  // When it went on from an earlier start.
  std::size_t shards_found = 0;
};

// The first process of the job puts the result together; the others return with `whole` when all is marched. Throws
// Error; what is whole stays, and the message of the error does not tell of it.
BatchEnd run_batch(const BatchPlan& plan, const BatchOptions& options, Job& job);

// Shards that are kept beside `output` now, without opening them; for messages.
std::size_t shards_beside(const std::filesystem::path& output);

}  // namespace pilotis
