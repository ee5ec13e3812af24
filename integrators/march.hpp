// One march of one system through one load by one scheme.
#pragma once

#include <span>

#include "core/response/observer.hpp"
#include "core/system/load.hpp"
#include "integrators/scheme.hpp"

namespace pilotis {

struct MarchSpan {
  double dt = 0;      // s; time is n dt
  long end = 0;       // march until this many whole steps are taken
  int halvings = 10;  // of a step that does not converge, before giving up
};

enum class MarchEnding { done, stopped, not_converged, not_finite };

struct MarchEnd {
  MarchEnding ending = MarchEnding::done;
  double time = 0;  // s, of the last accepted state
};

// Sets a from equilibrium and the memories from the displacement, for u, v of `state` at the load's t = 0.
void start(const System& system, const Load& load, State<double>& state);

// Takes `state` on from where it stands. Observers see every accepted state, and the one at t = 0 when it starts there.
MarchEnd march(const System& system, const Load& load, Stepper& stepper, const MarchSpan& span, State<double>& state,
               std::span<Observer* const> observers);

}  // namespace pilotis
