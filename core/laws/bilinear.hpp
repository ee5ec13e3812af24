// Bilinear with kinematic hardening: f = r k d + (1 - r) k (d - p), the second part bounded by (1 - r) f_y.
// Slope k to the yield shear f_y, slope r k beyond; unloading with k; the elastic range 2 f_y moves with the loop.
// Parameters: k > 0 (N/m), f_y > 0 (N), r < 1; r = 0 is elastoplastic, r < 0 softens.
// Loop at ductility mu: 4 f_y u_y (1 - r)(mu - 1). Source: Iwan 1966 (see slider.hpp); Chopra, ch. 7.
#pragma once

#include <array>

#include "core/laws/slider.hpp"

namespace pilotis {

struct Bilinear {
  static constexpr std::array parameters{
      Parameter{"stiffness", Dimension::stiffness, "the elastic stiffness", {}, 0.0, 1e300, false},
      Parameter{"yield_shear", Dimension::force, "the shear at yield", {}, 0.0, 1e300, false},
      Parameter{"post_yield_ratio", Dimension::none, "the post-yield over the elastic stiffness", 0.0, -1.0, 1.0, true,
                false}};
  static constexpr Method method{"bilinear", "bilinear with kinematic hardening", parameters};

  double stiffness;         // N/m
  double yield_shear;       // N
  double post_yield_ratio;  // -
  double backbone;          // r k, N/m, from the others
  Slider slider;            // the bounded part, from the others

  // Unchecked; input goes through make(). Same units as the fields.
  Bilinear(double k, double f_y, double r)
      : stiffness(k), yield_shear(f_y), post_yield_ratio(r), backbone(r * k), slider((1 - r) * k, (1 - r) * f_y) {}

  template <class R>
  struct Memory {
    R slip;  // m
  };

  static Bilinear make(std::span<const double> v) { return {v[0], v[1], v[2]}; }
  std::array<double, 3> values() const { return {stiffness, yield_shear, post_yield_ratio}; }
};

template <class R>
Reply<R> reply(const Bilinear& law, const R& deformation, const R&, const Bilinear::Memory<R>& committed,
               Bilinear::Memory<R>& trial) {
  const Reply<R> slider = slider_reply(law.slider, deformation, committed.slip, trial.slip);
  return {law.backbone * deformation + slider.force, law.backbone + slider.tangent};
}

inline double initial_stiffness(const Bilinear& law) { return law.stiffness; }
inline double yield_deformation(const Bilinear& law) { return law.yield_shear / law.stiffness; }

template <class R>
R stored_energy(const Bilinear& law, const Bilinear::Memory<R>& memory, const R& deformation) {
  return 0.5 * law.backbone * (deformation * deformation) + slider_stored_energy(law.slider, memory.slip, deformation);
}
template <class R>
R dissipated_energy(const Bilinear& law, const Bilinear::Memory<R>& before, const Bilinear::Memory<R>& after) {
  return slider_dissipated_energy(law.slider, before.slip, after.slip);
}

}  // namespace pilotis
