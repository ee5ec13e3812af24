// A Jenkin element, the brick of the kinematic-hardening laws: a spring k in series with a Coulomb slider that slips at
// |force| = strength. f = k (d - p), |f| <= strength; p, the slip, moves only while |f| would pass it.
// Source: Iwan, "A distributed-element model for hysteresis", J. Appl. Mech. 33 (1966) 893.
#pragma once

#include "core/laws/law.hpp"

namespace pilotis {

// k > 0 (N/m), strength > 0 (N). `slip` (m) is the committed one; `trial_slip` what it becomes at `deformation` (m).
template <class R>
Reply<R> slider_reply(double k, double strength, const R& deformation, const R& slip, R& trial_slip) {
  const R elastic = k * (deformation - slip);
  const R force = lane_max<R>(lane_min<R>(elastic, splat<R>(strength)), splat<R>(-strength));
  const auto slips = lane_abs<R>(elastic) > strength;
  trial_slip = select(slips, R(deformation - force / k), slip);
  return {force, select(slips, splat<R>(0), splat<R>(k))};
}

template <class R>
R slider_stored_energy(double k, const R& slip, const R& deformation) {
  const R stretch = deformation - slip;
  return 0.5 * k * stretch * stretch;
}

// Between two committed slips the slider moved one way only, at its strength.
template <class R>
R slider_dissipated_energy(double strength, const R& before, const R& after) {
  return strength * lane_abs<R>(after - before);
}

}  // namespace pilotis
