// What restarts a march exactly, and nothing else.
#pragma once

#include <vector>

#include "core/system/system.hpp"

namespace pilotis {

// The memories of all elements of one law, in the group's order.
template <class R>
struct MemoriesOver {
  template <class L>
  using Of = std::vector<typename L::template Memory<R>>;
};
template <class R>
using Memories = Laws::Tuple<MemoriesOver<R>::template Of>;

template <class R>
struct State {
  std::vector<R> u, v, a;  // m, m/s, m/s2 relative to the ground, [freedom]; a is the scheme's own
  Memories<R> memory;      // committed
  long step = 0;           // whole steps taken: time = (step + fraction) dt
  double fraction = 0;     // of the step in hand already taken, [0, 1)
  double inner_step = 0;   // s, an adaptive scheme's next trial step; 0: none yet
};

template <class R>
State<R> state_at_rest(const System& system) {
  State<R> state;
  state.u.assign(system.freedoms, splat<R>(0));
  state.v = state.a = state.u;
  [&]<std::size_t... I>(std::index_sequence<I...>) {
    (std::get<I>(state.memory).resize(std::get<I>(system.groups).laws.size()), ...);
  }
  (std::make_index_sequence<std::tuple_size_v<decltype(system.groups)>>{});
  return state;
}

}  // namespace pilotis
