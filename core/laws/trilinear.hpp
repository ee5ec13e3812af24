// Trilinear with kinematic hardening (cracking, then yielding): a spring and two Jenkin elements side by side.
// Slope k to the cracking shear f_c, slope r_c k to the yield shear f_y, slope r_y k beyond; reversals follow the
// skeleton enlarged twice (Masing's rule).
// Parameters: k > 0 (N/m), f_c > 0 (N), 0 < r_c < 1, f_y > f_c (N), r_y < r_c; r_y may be zero or negative.
// Yield deformation u_y = f_c/k + (f_y - f_c)/(r_c k).
// Source: Masing 1926; Iwan 1966 (see slider.hpp).
#pragma once

#include <array>

#include "core/laws/slider.hpp"

namespace pilotis {

struct Trilinear {
  static constexpr std::array parameters{
      Parameter{"stiffness", Dimension::stiffness, "the elastic stiffness", {}, 0.0, 1e300, false},
      Parameter{"cracking_shear", Dimension::force, "the shear at cracking", {}, 0.0, 1e300, false},
      Parameter{"cracked_ratio", Dimension::none, "the cracked over the elastic stiffness", {}, 0.0, 1.0, false, false},
      Parameter{"yield_shear", Dimension::force, "the shear at yield", {}, 0.0, 1e300, false},
      Parameter{"post_yield_ratio", Dimension::none, "the post-yield over the elastic stiffness", 0.0, -1.0, 1.0, true,
                false}};
  static constexpr Method method{"trilinear", "trilinear (cracking, yielding) with kinematic hardening", parameters};

  double stiffness;         // N/m
  double cracking_shear;    // N
  double cracked_ratio;     // -
  double yield_shear;       // N
  double post_yield_ratio;  // -
  double backbone;          // r_y k, N/m, from the others
  Slider crack, yield;      // each stops carrying more at its own deformation; from the others

  // Unchecked; input goes through make(). Same units as the fields.
  Trilinear(double k, double f_c, double r_c, double f_y, double r_y)
      : stiffness(k),
        cracking_shear(f_c),
        cracked_ratio(r_c),
        yield_shear(f_y),
        post_yield_ratio(r_y),
        backbone(r_y * k),
        crack((1 - r_c) * k, (1 - r_c) * k * cracking_deformation()),
        yield((r_c - r_y) * k, (r_c - r_y) * k * yield_deformation()) {}

  template <class R>
  struct Memory {
    R crack_slip, yield_slip;  // m
  };

  double cracking_deformation() const { return cracking_shear / stiffness; }  // m
  double yield_deformation() const {                                          // m
    return cracking_deformation() + (yield_shear - cracking_shear) / (cracked_ratio * stiffness);
  }

  // Throws Error (input) when f_y <= f_c or r_y >= r_c.
  static Trilinear make(std::span<const double> values);
  std::array<double, 5> values() const {
    return {stiffness, cracking_shear, cracked_ratio, yield_shear, post_yield_ratio};
  }
};

template <class R>
Reply<R> reply(const Trilinear& law, const R& deformation, const R&, const Trilinear::Memory<R>& committed,
               Trilinear::Memory<R>& trial) {
  const Reply<R> crack = slider_reply(law.crack, deformation, committed.crack_slip, trial.crack_slip);
  const Reply<R> yield = slider_reply(law.yield, deformation, committed.yield_slip, trial.yield_slip);
  return {law.backbone * deformation + crack.force + yield.force, law.backbone + crack.tangent + yield.tangent};
}

inline double initial_stiffness(const Trilinear& law) { return law.stiffness; }
inline double yield_deformation(const Trilinear& law) { return law.yield_deformation(); }

template <class R>
R stored_energy(const Trilinear& law, const Trilinear::Memory<R>& memory, const R& deformation) {
  return 0.5 * law.backbone * (deformation * deformation) +
         slider_stored_energy(law.crack, memory.crack_slip, deformation) +
         slider_stored_energy(law.yield, memory.yield_slip, deformation);
}
template <class R>
R dissipated_energy(const Trilinear& law, const Trilinear::Memory<R>& before, const Trilinear::Memory<R>& after) {
  return slider_dissipated_energy(law.crack, before.crack_slip, after.crack_slip) +
         slider_dissipated_energy(law.yield, before.yield_slip, after.yield_slip);
}

}  // namespace pilotis
