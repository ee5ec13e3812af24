// What a batch would be, without running it.
#pragma once

#include "apps/batch/plan.hpp"

namespace pilotis {

// From the plan, and from a short march on this machine.
struct BatchEstimate {
  double seconds = 0;        // of marching, on `threads` threads of this machine
  double peak_bytes = 0;     // on disk: all but the histories
  double history_bytes = 0;  // on disk, before compression
};

// Marches a second of the first runs to measure the rate. Throws Error as a march does.
BatchEstimate estimate(const BatchPlan& plan, int threads);

}  // namespace pilotis
