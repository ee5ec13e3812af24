// What a study comes to: its buildings ready to march, its runs by number, the shards they are cut into, and how much
// work that is. All of it follows from the study alone, never from how many threads or machines there are.
#pragma once

#include <cstddef>
#include <vector>

#include "core/response/results.hpp"
#include "core/system/system.hpp"
#include "integrators/auto_step.hpp"
#include "integrators/runs.hpp"
#include "io/study/study.hpp"

namespace pilotis {

struct PreparedBuilding {
  System system;
  BuildingSummary summary;
  RunSettings settings;
};

// Runs are counted from 0: ((building * factors + factor) * motions + motion).
struct RunId {
  std::size_t building = 0;
  std::size_t motion = 0;  // of the study; of no meaning without motions
  double factor = 1;
};

// Runs first, first + 1, ... of one building.
struct Shard {
  std::size_t building = 0, first = 0, count = 0;
};

std::size_t run_count(const Study& study);

class BatchPlan {
 public:
  // Refers to the study, which must outlive it. Throws Error (input) when the study asks for what a building or the
  // scheme cannot do.
  explicit BatchPlan(const Study& study);

  const Study& study() const { return study_; }
  const PreparedBuilding& building(std::size_t i) const { return buildings_[i]; }
  std::vector<BuildingSummary> summaries() const;

  std::size_t runs() const { return run_count(study_); }
  RunId id(std::size_t run) const;
  const std::vector<Shard>& shards() const { return shards_; }

  // The step of the runs of one building under one motion. Throws Error (input) when the study's own will not do.
  StepChoice step(std::size_t building, std::size_t motion) const;

  // Estimates: story-steps of all marches, error checks included; bytes of the histories before compression.
  double story_steps() const { return story_steps_; }
  double history_bytes() const { return history_bytes_; }

  // Whether the shards are written down as they are done. A study that is over in seconds is not worth the trouble.
  bool saves_shards() const;

 private:
  // Of all runs of one building at one factor.
  struct Work {
    double story_steps = 0, history_bytes = 0;
  };
  std::size_t runs_per_building() const { return runs() / study_.buildings.size(); }
  Work work_of(std::size_t building) const;
  void cut(std::size_t building, const Work& work);

  const Study& study_;
  std::vector<PreparedBuilding> buildings_;
  std::vector<Shard> shards_;
  double story_steps_ = 0, history_bytes_ = 0;
};

}  // namespace pilotis
