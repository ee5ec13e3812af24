// Whoever watches a march. Observers see accepted states only, in order of time, the first at the start.
#pragma once

#include "core/system/state.hpp"

namespace pilotis {

// What there is to see at one accepted state; valid during the call only.
struct Instant {
  double time;      // s
  bool whole_step;  // false at states inside a step (a halved step, an adaptive scheme's own)
  const State<double>& state;
  const double* load;           // p - M iota a_g, N, [freedom]
  double ground;                // a_g, m/s2
  const double* values;         // ResponseLayout order, SI
  const double* acceleration;   // relative, from equilibrium, m/s2, [freedom]
  const double* damping_force;  // C v, N, [freedom]
};

class Observer {
 public:
  virtual ~Observer() = default;
  // False stops the march.
  virtual bool see(const Instant& instant) noexcept = 0;
};

}  // namespace pilotis
