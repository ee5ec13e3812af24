// Whoever watches a march. Observers see accepted states only, in order of time, the first at the start; written over
// the lane scalar, so one observer watches one run or a pack of them, each lane on its own.
#pragma once

#include "core/system/state.hpp"

namespace pilotis {

// What there is to see at one accepted state; valid during the call only.
template <class R>
struct InstantOver {
  R time;              // s
  Mask<R> whole_step;  // false at states inside a step (a halved step, an adaptive scheme's own)
  const State<R>& state;
  const R* load;                   // p - M iota a_g, N, [freedom]
  R ground;                        // a_g, m/s2
  const R* values;                 // ResponseLayout order, SI
  const R* acceleration;           // relative, from equilibrium, m/s2, [freedom]
  const R* damping_force;          // C v, N, [freedom]
  const R* deformation;            // m, [element]
  const R* previous;               // values of the state each lane showed before; without meaning at its first
  Mask<R> seen = every_lane<R>();  // lanes with a new accepted state; the others are not to be looked at
};
using Instant = InstantOver<double>;

template <class R>
class ObserverOver {
 public:
  virtual ~ObserverOver() = default;
  // The lanes that may go on; what it says of lanes it has not seen does not matter.
  virtual Mask<R> see(const InstantOver<R>& instant) noexcept = 0;
  // A new run starts in this lane: forget the former one.
  virtual void restart(int /*lane*/) noexcept {}
};
using Observer = ObserverOver<double>;

}  // namespace pilotis
