// One shard, marched.
#pragma once

#include <optional>
#include <vector>

#include "apps/batch/plan.hpp"

namespace pilotis {

// Results of shard's runs, in their order; nothing when `watch` asked to stop. Throws Error when a record can no longer
// be read. May be called by any number of threads at once, each with its own shard.
std::optional<std::vector<RunResult>> march_shard(const BatchPlan& plan, const Shard& shard, BatchWatch& watch);

}  // namespace pilotis
