// The system's answers to a scheme, over the lane scalar: internal forces for a displacement and velocity, and the
// tangent that goes with them. The hot path: no Eigen, no allocation, no branch on values.
#pragma once

#include <algorithm>
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

// Deformation of element e of a group, or its rate, from x [freedom].
template <class R, class L>
R element_value(const Rows& rows, const ElementGroup<L>& group, std::size_t e, const R* x) noexcept {
  if (group.pairs.empty()) return row_value(rows, group.row[e], x);
  const PairRow& pair = group.pairs[e];
  return pair.a * x[pair.first] + pair.b * x[pair.second];
}

template <class R, class L>
void add_element_force(const Rows& rows, const ElementGroup<L>& group, std::size_t e, const R& force, R* out) noexcept {
  if (group.pairs.empty()) return add_row_force(rows, group.row[e], force, out);
  const PairRow& pair = group.pairs[e];
  out[pair.first] += pair.a * force;
  out[pair.second] += pair.b * force;
}

// Whether a law looks at the rate of deformation: one that does says `static constexpr bool uses_rate = true`.
template <class L>
constexpr bool uses_rate() {
  if constexpr (requires { L::uses_rate; }) return L::uses_rate;
  return false;
}

// What the system answers to a displacement and a velocity.
template <class R>
struct Forces {
  explicit Forces(const System& system)
      : damping(system.freedoms, splat<R>(0)),
        internal(damping),
        deformation(system.elements, splat<R>(0)),
        element(deformation),
        tangent(deformation),
        with_damping(!is_zero(system.damping) || !system.modal_damping.weight.empty()),
        with_stiffness(!is_zero(system.stiffness)) {}

  std::vector<R> damping;      // C v, N, [freedom]
  std::vector<R> internal;     // C v + K u + sum B^T f, N, [freedom]
  std::vector<R> deformation;  // m, [element], of those that are not in K
  std::vector<R> element;      // N, [element], of the same
  std::vector<R> tangent;      // N/m, [element], of the same
  bool with_damping, with_stiffness;
};

// Replies of the elements that are not in K: adds their forces to forces.internal, and writes what they would remember
// to `trial`.
template <class R>
void add_element_forces(const System& system, const R* u, const R* v, const Memories<R>& committed, Memories<R>& trial,
                        Forces<R>& forces) noexcept {
  R* const internal = forces.internal.data();
  for_each_group<R>(system, committed, trial,
                    [&]<class L>(const ElementGroup<L>& group, const auto& before, auto& after) {
                      if constexpr (!std::is_same_v<L, Linear>)
                        for (std::size_t e = 0; e < group.laws.size(); ++e) {
                          const R deformation = element_value(system.rows, group, e, u);
                          R rate = splat<R>(0);
                          if constexpr (uses_rate<L>()) rate = element_value(system.rows, group, e, v);
                          const Reply<R> answer = reply<R>(group.laws[e], deformation, rate, before[e], after[e]);
                          add_element_force(system.rows, group, e, answer.force, internal);
                          forces.deformation[group.id[e]] = deformation;
                          forces.element[group.id[e]] = answer.force;
                          forces.tangent[group.id[e]] = answer.tangent;
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

// All of `forces` at u, v, starting from the committed memories.
template <class R>
void internal_forces(const System& system, const R* u, const R* v, const Memories<R>& committed, Memories<R>& trial,
                     Forces<R>& forces) noexcept {
  if (forces.with_damping) {
    std::fill(forces.damping.begin(), forces.damping.end(), splat<R>(0));
    add_damping_forces(system, v, forces.damping.data());
  }
  std::copy(forces.damping.begin(), forces.damping.end(), forces.internal.begin());
  if (forces.with_stiffness) band_multiply_add(system.stiffness, u, forces.internal.data());
  add_element_forces(system, u, v, committed, trial, forces);
}

// Deformations and forces of the elements that stand in K: internal_forces() leaves them out, whoever shows them does
// not.
template <class R>
void read_linear_elements(const System& system, const R* u, Forces<R>& forces) noexcept {
  const auto& group = std::get<ElementGroup<Linear>>(system.groups);
  for (std::size_t e = 0; e < group.laws.size(); ++e) {
    const R deformation = element_value(system.rows, group, e, u);
    forces.deformation[group.id[e]] = deformation;
    forces.element[group.id[e]] = group.laws[e].stiffness * deformation;
  }
}

// band = M + c_c C (without its low-rank part) + c_k K: what does not change from step to step.
template <class R>
void steady_band(const System& system, const R& c_c, const R& c_k, R* band) noexcept {
  const std::size_t size = system.stiffness.entries.size();
  for (std::size_t i = 0; i < size; ++i) band[i] = c_c * system.damping.entries[i] + c_k * system.stiffness.entries[i];
  for (int i = 0; i < system.freedoms; ++i) band[std::size_t(i) * (system.half + 1)] += system.mass[i];
}

template <class R>
void add_row_tangent(const Scatter& scatter, int row, const R& k, R* band) noexcept {
  for (int s = scatter.start[row]; s < scatter.start[row + 1]; ++s) band[scatter.position[s]] += scatter.weight[s] * k;
}

template <class R>
void add_pair_tangent(const PairRow& pair, const R& k, R* band) noexcept {
  band[pair.at_first] += pair.a_a * k;
  band[pair.at_second] += pair.b_b * k;
  band[pair.at_both] += pair.a_b * k;
}

// band += c_k sum B^T tangent B.
template <class R>
void add_tangents(const System& system, const R& c_k, const R* tangent, R* band) noexcept {
  for_each_group(system, [&]<class L>(const ElementGroup<L>& group) {
    if constexpr (!std::is_same_v<L, Linear>)
      for (std::size_t e = 0; e < group.laws.size(); ++e) {
        const R k = c_k * tangent[group.id[e]];
        if (group.pairs.empty())
          add_row_tangent(system.scatter, group.row[e], k, band);
        else
          add_pair_tangent(group.pairs[e], k, band);
      }
  });
}

}  // namespace pilotis
