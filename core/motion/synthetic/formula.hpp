// What the kinds without random numbers share: an acceleration in closed form, sampled.
#pragma once

#include <array>
#include <utility>

#include "core/motion/synthetic/kind.hpp"
#include "core/motion/synthetic/parameters.hpp"

namespace pilotis {

// `acceleration(t)` in m/s2 at every sample of the grid. No baseline correction: the motion is the formula.
template <class Formula>
Accelerogram sampled_formula(const SyntheticInput& input, Formula acceleration) {
  Accelerogram record;
  record.step = input.grid.step;
  record.samples.resize(input.count());
  for (std::size_t i = 0; i < record.samples.size(); ++i)
    record.samples[i] = acceleration(static_cast<double>(i) * input.grid.step);
  return record;
}

// Throws Error (input) naming `key` unless [from, to], s, lies within the duration.
void require_within(const SyntheticInput& input, std::string_view key, double from, double to);

// A share, 0 to 1, that rises linearly within `ramp` (s) from 0 at the start and falls so to 0 at the end of
// `duration` (s); 1 throughout for ramp = 0.
double ramped(double time, double ramp, double duration);

}  // namespace pilotis
