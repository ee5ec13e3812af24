// A Jenkin element, the brick of the kinematic-hardening laws: a spring k in series with a Coulomb slider that slips at
// |force| = strength. f = k (d - p), |f| <= strength; p, the slip, moves only while |f| would pass it.
// Source: Iwan, "A distributed-element model for hysteresis", J. Appl. Mech. 33 (1966) 893.
#pragma once

#include "core/laws/law.hpp"

namespace pilotis {

struct Slider {
  double stiffness;    // k, N/m, > 0
  double strength;     // N, > 0
  double flexibility;  // 1/k, m/N: a division in every step would cost a tenth of the march

  Slider(double k, double largest) : stiffness(k), strength(largest), flexibility(1 / k) {}
};

// `slip` (m) is the committed one; `trial_slip` what it becomes at `deformation` (m).
template <class R>
Reply<R> slider_reply(const Slider& slider, const R& deformation, const R& slip, R& trial_slip) {
  const R elastic = slider.stiffness * (deformation - slip);
  const R force = lane_max<R>(lane_min<R>(elastic, splat<R>(slider.strength)), splat<R>(-slider.strength));
  const auto slips = lane_abs(elastic) > slider.strength;
  trial_slip = select(slips, R(deformation - force * slider.flexibility), slip);
  return {force, select(slips, splat<R>(0), splat<R>(slider.stiffness))};
}

template <class R>
R slider_stored_energy(const Slider& slider, const R& slip, const R& deformation) {
  const R stretch = deformation - slip;
  return 0.5 * slider.stiffness * (stretch * stretch);
}

// Between two committed slips the slider moved one way only, at its strength.
template <class R>
R slider_dissipated_energy(const Slider& slider, const R& before, const R& after) {
  return slider.strength * lane_abs(R(after - before));
}

}  // namespace pilotis
