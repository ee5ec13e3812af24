// What every made motion is asked for besides its own parameters.
#pragma once

#include <cstdint>

namespace pilotis {

struct SyntheticGrid {
  std::uint64_t seed = 0;  // the same seed gives the same motion on every machine
  double step = 0.01;      // s, > 0
  double duration = 20;    // s, a whole number of steps, at least two
};

}  // namespace pilotis
