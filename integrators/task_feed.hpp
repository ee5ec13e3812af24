// Hands a list of marches to the stepping loop, the longest first, so that the lanes fall idle together at the end.
#pragma once

#include <algorithm>
#include <atomic>
#include <numeric>
#include <span>
#include <vector>

#include "integrators/lane_loop.hpp"
#include "integrators/watched_march.hpp"

namespace pilotis {

template <class R>
class TaskFeed {
 public:
  TaskFeed(const System& system, const BatchSettings& settings, std::span<const MarchTask> tasks, Watches<R>& watches,
           Marched* out, std::atomic<long>* ended)
      : system_(system),
        settings_(settings),
        tasks_(tasks),
        watches_(watches),
        out_(out),
        ended_(ended),
        order_(tasks.size()) {
    std::iota(order_.begin(), order_.end(), 0);
    std::stable_sort(order_.begin(), order_.end(),
                     [&](std::size_t a, std::size_t b) { return tasks_[a].steps > tasks_[b].steps; });
  }

  // N, of the run in each lane; lanes without a run pass any residual.
  const R& tolerance() const { return tolerance_; }

  bool next(int lane, LaneRun& run, State<R>& state) {
    if (given_ == order_.size()) return false;
    in_hand_[lane] = order_[given_++];
    const MarchTask& task = tasks_[in_hand_[lane]];
    const State<double> from = initial_state(system_, *task.load, settings_);
    put_lane(from, state, lane);
    set_lane(tolerance_, lane, step_tolerance(system_, *task.load, from, settings_));
    watches_.restart(lane, task);
    run = {task.load, task.dt, task.steps};
    return true;
  }

  void ended(int lane, const MarchEnd& end, const State<R>&) {
    out_[in_hand_[lane]] = watches_.collected(lane, end);
    if (ended_ != nullptr) ended_->fetch_add(1, std::memory_order_relaxed);
  }

 private:
  const System& system_;
  const BatchSettings& settings_;
  std::span<const MarchTask> tasks_;
  Watches<R>& watches_;
  Marched* out_;
  std::atomic<long>* ended_;
  std::vector<std::size_t> order_;  // of the tasks, as they are handed out
  std::size_t given_ = 0;
  std::array<std::size_t, LaneTraits<R>::width> in_hand_{};
  R tolerance_ = splat<R>(0);
};

}  // namespace pilotis
