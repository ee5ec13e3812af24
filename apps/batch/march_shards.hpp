// All shards of a batch that are still missing, marched by as many threads as asked for, while the calling thread keeps
// what they hand over.
#pragma once

#include <functional>
#include <string>
#include <vector>

#include "apps/batch/job.hpp"
#include "apps/batch/plan.hpp"

namespace pilotis {

// A shard that has been marched.
struct MarchedShard {
  std::size_t shard = 0;
  std::vector<RunResult> results;
  double seconds = 0;  // of one thread
};

// What the calling thread does meanwhile.
struct ShardCalls {
  // Keeps a shard. May throw; the batch then ends as for an error in a march.
  std::function<void(MarchedShard)> keep;
  // Called some twenty times a second with the runs marched since the start, in this process. True asks to stop: the
  // shards in hand are dropped.
  std::function<bool(double runs)> tick;
};

// Draws from `missing` by the job's counter until nothing is left. True when all that was drawn here has been kept;
// false when tick() asked to stop. An Error of a march or of keep() is thrown on when the other threads have ended
// their shards and those have been kept.
bool march_shards(const BatchPlan& plan, const std::vector<std::size_t>& missing, int threads, Job& job,
                  const ShardCalls& calls);

}  // namespace pilotis
