// What restarts a march exactly, and nothing else.
#pragma once

#include <array>
#include <cstring>
#include <type_traits>
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

// Where one lane stands: time = (step + fraction) dt.
struct Clock {
  long step = 0;        // whole steps taken
  double fraction = 0;  // of the step in hand already taken, [0, 1)
};

template <class R>
struct State {
  std::vector<R> u, v, a;  // m, m/s, m/s2 relative to the ground, [freedom]; a is the scheme's own
  Memories<R> memory;      // committed
  std::array<Clock, LaneTraits<R>::width> clock{};
  double inner_step = 0;  // s, an adaptive scheme's next trial step; 0: none yet
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

// A memory is a struct of R only (core/laws/law.hpp): field by field, one lane.
template <class R, class One, class Many>
void put_lane_memory(const One& from, Many& into, int i) {
  if constexpr (!std::is_empty_v<One>) {
    constexpr std::size_t fields = sizeof(One) / sizeof(double);
    static_assert(sizeof(Many) == fields * sizeof(R), "a law's memory holds lane scalars only");
    double values[fields];
    std::memcpy(values, &from, sizeof from);
    for (std::size_t f = 0; f < fields; ++f)
      std::memcpy(reinterpret_cast<char*>(&into) + f * sizeof(R) + i * sizeof(double), &values[f], sizeof(double));
  }
}

template <class R>
void put_lane_memories(const Memories<double>& from, Memories<R>& into, int i) {
  [&]<std::size_t... I>(std::index_sequence<I...>) {
    const auto copy = [i](const auto& one, auto& many) {
      for (std::size_t e = 0; e < one.size(); ++e) put_lane_memory<R>(one[e], many[e], i);
    };
    (copy(std::get<I>(from), std::get<I>(into)), ...);
  }
  (std::make_index_sequence<std::tuple_size_v<Memories<double>>>{});
}

// into = from where `moves`; by fields, as above.
template <class R>
void select_memories(const Mask<R>& moves, const Memories<R>& from, Memories<R>& into) noexcept {
  const auto choose = [&]<class M>(const std::vector<M>& one, std::vector<M>& other) {
    if constexpr (!std::is_empty_v<M>)
      for (std::size_t e = 0; e < one.size(); ++e)
        for (std::size_t f = 0; f < sizeof(M) / sizeof(R); ++f) {
          const R& yes = reinterpret_cast<const R*>(&one[e])[f];
          R& no = reinterpret_cast<R*>(&other[e])[f];
          no = select(moves, yes, no);
        }
  };
  [&]<std::size_t... I>(std::index_sequence<I...>) { (choose(std::get<I>(from), std::get<I>(into)), ...); }
  (std::make_index_sequence<std::tuple_size_v<Memories<R>>>{});
}

// Copies a state of one run into one lane, clock and all.
template <class R>
void put_lane(const State<double>& from, State<R>& into, int i) {
  const auto copy = [i](const auto& one, auto& many) {
    for (std::size_t k = 0; k < one.size(); ++k) set_lane(many[k], i, one[k]);
  };
  copy(from.u, into.u), copy(from.v, into.v), copy(from.a, into.a);
  put_lane_memories<R>(from.memory, into.memory, i);
  into.clock[i] = from.clock[0];
}

}  // namespace pilotis
