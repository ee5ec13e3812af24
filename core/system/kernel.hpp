// The system's answers to a scheme, over the lane scalar: internal forces for a displacement and velocity, and the
// tangent that goes with them. The hot path: no Eigen, no allocation, no branch on values.
#pragma once

#include <type_traits>

#include "core/system/state.hpp"

namespace pilotis {

template <class R>
R row_value(const Rows& rows, int row, const R* x) noexcept {
  R sum = splat<R>(0);
  for (int k = rows.start[row]; k < rows.start[row + 1]; ++k) sum += rows.coefficient[k] * x[rows.freedom[k]];
  return sum;
}

template <class R>
void add_row_force(const Rows& rows, int row, const R& force, R* out) noexcept {
  for (int k = rows.start[row]; k < rows.start[row + 1]; ++k) out[rows.freedom[k]] += rows.coefficient[k] * force;
}

// Calls f(group, memories) for every law's group.
template <class R, class F>
void for_each_group(const System& system, const Memories<R>& memories, F f) {
  [&]<std::size_t... I>(std::index_sequence<I...>) { (f(std::get<I>(system.groups), std::get<I>(memories)), ...); }
  (std::make_index_sequence<std::tuple_size_v<decltype(system.groups)>>{});
}

// Calls f(group, memories, other memories) for every law's group; the others may be changed unless they are const.
template <class R, class Other, class F>
void for_each_group(const System& system, const Memories<R>& committed, Other& trial, F f) {
  [&]<std::size_t... I>(std::index_sequence<I...>) {
    (f(std::get<I>(system.groups), std::get<I>(committed), std::get<I>(trial)), ...);
  }
  (std::make_index_sequence<std::tuple_size_v<decltype(system.groups)>>{});
}

// Replies of the elements that are not in K. Adds their forces to `internal` [freedom], writes their tangents to
// `tangent` [element] and what they would remember to `trial`.
template <class R>
void add_element_forces(const System& system, const R* u, const R* v, const Memories<R>& committed, Memories<R>& trial,
                        R* internal, R* tangent) noexcept {
  for_each_group<R>(system, committed, trial,
                    [&]<class L>(const ElementGroup<L>& group, const auto& before, auto& after) {
                      if constexpr (!std::is_same_v<L, Linear>)
                        for (std::size_t e = 0; e < group.laws.size(); ++e) {
                          const R deformation = row_value(system.rows, group.row[e], u);
                          const R rate = row_value(system.rows, group.row[e], v);
                          const Reply<R> answer = reply(group.laws[e], deformation, rate, before[e], after[e]);
                          add_row_force(system.rows, group.row[e], answer.force, internal);
                          tangent[group.id[e]] = answer.tangent;
                        }
                    });
}

// y += C x, the low-rank part included.
template <class R>
void add_damping_forces(const System& system, const R* x, R* y) noexcept {
  band_multiply_add(system.damping, x, y);
  for (std::size_t j = 0; j < system.modal_damping.weight.size(); ++j) {
    const double* w = system.modal_damping.columns[j].data();
    R amount = splat<R>(0);
    for (int i = 0; i < system.freedoms; ++i) amount += w[i] * x[i];
    amount *= system.modal_damping.weight[j];
    for (int i = 0; i < system.freedoms; ++i) y[i] += w[i] * amount;
  }
}

// internal = C v + K u + sum B^T f; [freedom].
template <class R>
void internal_forces(const System& system, const R* u, const R* v, const Memories<R>& committed, Memories<R>& trial,
                     R* internal, R* tangent) noexcept {
  for (int i = 0; i < system.freedoms; ++i) internal[i] = splat<R>(0);
  add_damping_forces(system, v, internal);
  band_multiply_add(system.stiffness, u, internal);
  add_element_forces(system, u, v, committed, trial, internal, tangent);
}

// band = c_m M + c_c C (without its low-rank part) + c_k (K + sum B^T tangent B).
template <class R>
void effective_band(const System& system, double c_m, double c_c, double c_k, const R* tangent, R* band) noexcept {
  const std::size_t size = system.stiffness.entries.size();
  for (std::size_t i = 0; i < size; ++i)
    band[i] = splat<R>(c_c * system.damping.entries[i] + c_k * system.stiffness.entries[i]);
  for (int i = 0; i < system.freedoms; ++i) band[std::size_t(i) * (system.half + 1)] += c_m * system.mass[i];
  for_each_group(system, [&]<class L>(const ElementGroup<L>& group) {
    if constexpr (!std::is_same_v<L, Linear>)
      for (std::size_t e = 0; e < group.laws.size(); ++e) {
        const R k = c_k * tangent[group.id[e]];
        const int row = group.row[e];
        for (int s = system.scatter.start[row]; s < system.scatter.start[row + 1]; ++s)
          band[system.scatter.position[s]] += system.scatter.weight[s] * k;
      }
  });
}

}  // namespace pilotis
