#include "integrators/march.hpp"

#include "core/system/kernel.hpp"
#include "integrators/lane_loop.hpp"
#include "integrators/stepper_take.hpp"

namespace pilotis {

namespace {

// One run, from a state that is already there and back into it.
struct SingleFeed {
  LaneRun run;
  State<double>& caller_state;
  MarchEnd end;
  bool given = false;

  bool next(int, LaneRun& into, State<double>& state) {
    if (given) return false;
    given = true;
    into = run;
    state = caller_state;
    return true;
  }
  void ended(int, const MarchEnd& how, const State<double>& state) {
    end = how;
    caller_state = state;
  }
};

}  // namespace

void start(const System& system, const Load& load, State<double>& state) {
  std::vector<double> p(system.freedoms);
  Forces<double> forces(system);
  Memories<double> virgin = state.memory;
  load.at(0, p.data());
  internal_forces(system, state.u.data(), state.v.data(), virgin, state.memory, forces);
  for (int i = 0; i < system.freedoms; ++i) state.a[i] = (p[i] - forces.internal[i]) / system.mass[i];
}

MarchEnd march(const System& system, const Load& load, Stepper& stepper, const MarchSpan& span, State<double>& state,
               std::span<Observer* const> observers) {
  LaneLoop<double> loop(system, span.halvings, observers);
  SingleFeed feed{{&load, span.dt, span.end}, state, {}};
  StepperTake take{stepper};
  loop.run(take, feed, nullptr);
  return feed.end;
}

}  // namespace pilotis
