// One run from start to end: march, observe, march again for the error check, and put the results together.
#pragma once

#include <memory>
#include <vector>

#include "core/response/results.hpp"
#include "core/system/load.hpp"
#include "integrators/scheme.hpp"

namespace pilotis {

struct RunPlan {
  std::shared_ptr<const Scheme> scheme;
  double step = 0;                // s
  double duration = 0;            // s, of the whole march, tail included; rounded up to whole steps
  double tail = 0;                // s of it after the load has ended
  double fundamental_period = 0;  // s, the window of the residual drift
  bool error_check = true;
  double collapse_drift_ratio = 0.10;
  double tolerance = 1e-9;  // Newton: of the largest load (or the largest initial internal force)
  int halvings = 10;
  std::vector<const Quantity*> histories;
  int every = 1;
  std::vector<double> initial_displacement, initial_velocity;  // m, m/s, [floor]; empty: at rest
};

// Fills everything of RunResult but motion, factor and step_choice. Never throws for what happens in the march: that is
// the result's status. Throws Error (input) when the scheme refuses the system.
//
// Step errors. The march is repeated at half the step (adaptive schemes: also at a hundredth of their tolerances). For
// a linear building and a scheme of order 2 the error of a peak is close to 4/3 of the difference (Richardson); with
// laws that yield, or order 1, twice the difference is given, as for a first-order method. A difference can vanish by
// chance at one story while its neighbors' do not: each peak takes the largest relative difference of three adjacent
// stories (or floors), itself in the middle where it can be. To this comes what a peak between two states may rise
// above the kept one (core/response/peaks.hpp). An estimate, not a bound: about one peak in a thousand of many random
// yielding sticks was farther off, by half as much again (tests/integrators/step_error_test.cpp asks for one in a
// hundred and twice). Where the repeated march ends otherwise (collapse in one of them) the errors are infinite.
RunResult run_once(const System& system, const Load& load, const RunPlan& plan);

}  // namespace pilotis
