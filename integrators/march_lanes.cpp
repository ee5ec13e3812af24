// Compiled once per instruction set (core/lanes/kernels.cmake): no Eigen here.
#include "integrators/march_lanes.hpp"

#include "integrators/lane_loop.hpp"
#include "integrators/task_feed.hpp"

namespace pilotis::PILOTIS_INSTRUCTION_SET {

namespace {

using R = Pack<PILOTIS_LANES>;

struct ImplicitTake {
  const System& system;
  const ImplicitCoefficients& coefficients;
  const R& tolerance;
  ImplicitWorkspace<R> workspace;

  Taken<R> operator()(State<R>& state, const LoadStepOver<R>& load) noexcept {
    const Mask<R> done =
        implicit_step(system, coefficients, load.dt, tolerance, load.before, load.after, state, workspace);
    return {done, Mask<R>{}, splat<R>(1), &workspace.forces};
  }
};

}  // namespace

bool march_lanes(const System& system, const ImplicitCoefficients& coefficients, const BatchSettings& settings,
                 std::span<const MarchTask> tasks, Marched* out, const std::atomic<bool>* stop,
                 std::atomic<long>* ended) {
  Watches<R> watches(system, settings);
  TaskFeed<R> feed(system, settings, tasks, watches, out, ended);
  ImplicitTake take{system, coefficients, feed.tolerance(), ImplicitWorkspace<R>(system)};
  LaneLoop<R> loop(system, settings.halvings, watches.all());
  return loop.run(take, feed, stop);
}

}  // namespace pilotis::PILOTIS_INSTRUCTION_SET
