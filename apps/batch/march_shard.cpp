#include "apps/batch/march_shard.hpp"

#include <algorithm>
#include <memory>

#include "core/system/load.hpp"

namespace pilotis {

namespace {

// What the runs of a shard are marched through; `load` refers to `record`.
struct Prepared {
  std::shared_ptr<const Accelerogram> record;
  std::unique_ptr<Load> load;
  StepChoice choice;
  RunLength length;
};

Prepared prepared(const BatchPlan& plan, const RunId& id) {
  const Study& study = plan.study();
  Prepared made;
  if (!study.motions.empty()) made.record = study.motions.samples(id.motion);
  made.load = std::make_unique<Load>(plan.building(id.building).system, made.record.get(), id.factor, study.forces);
  made.choice = plan.step(id.building, id.motion);
  const double end = made.load->end(), duration = study.march.duration.value_or(end + study.march.tail);
  // No tail when the study ends the run while the load goes on.
  made.length = {made.choice.step, duration, std::max(0.0, duration - end)};
  return made;
}

}  // namespace

std::optional<std::vector<RunResult>> march_shard(const BatchPlan& plan, const Shard& shard, BatchWatch& watch) {
  std::vector<Prepared> prepared_runs;
  std::vector<RunTask> tasks;
  for (std::size_t i = 0; i < shard.count; ++i) {
    prepared_runs.push_back(prepared(plan, plan.id(shard.first + i)));
    tasks.push_back({prepared_runs.back().load.get(), prepared_runs.back().length});
  }
  std::vector<RunResult> results(shard.count);
  const PreparedBuilding& building = plan.building(shard.building);
  if (!run_many(building.system, building.settings, tasks, results, &watch)) return std::nullopt;
  for (std::size_t i = 0; i < shard.count; ++i) {
    const RunId id = plan.id(shard.first + i);
    results[i].building = static_cast<int>(id.building);
    results[i].motion = plan.study().motions.empty() ? "none" : plan.study().motions[id.motion].name;
    results[i].factor = id.factor;
    results[i].step_choice = prepared_runs[i].choice.why;
  }
  return results;
}

}  // namespace pilotis
