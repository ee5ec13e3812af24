// Linear elastic spring: f = k d.
// Parameters: stiffness k > 0 (N/m). No memory. Source: Hooke's law.
#pragma once

#include <array>

#include "core/laws/law.hpp"

namespace pilotis {

struct Linear {
  static constexpr std::array parameters{
      Parameter{"stiffness", Dimension::stiffness, "the elastic stiffness", {}, 0.0, 1e300, false}};
  static constexpr Method method{"linear", "linear elastic spring", parameters};

  double stiffness;  // N/m

  template <class R>
  struct Memory {};

  static Linear make(std::span<const double> v) { return {v[0]}; }
  std::array<double, 1> values() const { return {stiffness}; }
};

template <class R>
Reply<R> reply(const Linear& law, const R& deformation, const R&, const Linear::Memory<R>&, Linear::Memory<R>&) {
  return {law.stiffness * deformation, splat<R>(law.stiffness)};
}

inline double initial_stiffness(const Linear& law) { return law.stiffness; }
inline double yield_deformation(const Linear&) { return 0; }

template <class R>
R stored_energy(const Linear& law, const Linear::Memory<R>&, const R& deformation) {
  return 0.5 * law.stiffness * deformation * deformation;
}
template <class R>
R dissipated_energy(const Linear&, const Linear::Memory<R>&, const Linear::Memory<R>&) {
  return splat<R>(0);
}

}  // namespace pilotis
