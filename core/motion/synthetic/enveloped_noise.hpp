// What every kind of filtered noise does with its stationary noise f(t):
//     a(t) = I(t) f(t), brought to rest at its end (baseline.hpp), scaled to the intensity asked for (intensity.hpp).
#pragma once

#include "core/motion/synthetic/envelope.hpp"
#include "core/motion/synthetic/intensity.hpp"

namespace pilotis {

// `noise`: one value for each sample of the grid, m/s2.
MadeMotion enveloped(std::vector<double> noise, const Envelope& envelope, const SyntheticInput& input);

}  // namespace pilotis
