// A force on one floor over time: wind, machinery, a push that is let go.
#pragma once

#include <vector>

namespace pilotis {

// Linear between the times; zero before the first and after the last. A first value that is not zero is a sudden push.
struct FloorForce {
  int floor = 1;               // counted from 1
  std::vector<double> times;   // s, rising, >= 0
  std::vector<double> forces;  // N, positive to the right
};

}  // namespace pilotis
