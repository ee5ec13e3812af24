// Runs from start to end: march, observe, march again for the error check, and put the results together. Runs of one
// building are marched side by side in lanes where the scheme can; a run gives the same bits alone or in company.
#pragma once

#include <atomic>
#include <memory>
#include <span>
#include <vector>

#include "core/response/results.hpp"
#include "core/system/load.hpp"
#include "integrators/scheme.hpp"
#include "integrators/watched_march.hpp"

namespace pilotis {

// How long one run is.
struct RunLength {
  double step = 0;      // s
  double duration = 0;  // s, of the whole march, tail included; rounded up to whole steps
  double tail = 0;      // s of it after the load has ended
};

// What one run of a batch is marched through.
struct RunTask {
  const Load* load = nullptr;  // must outlive the march
  RunLength length;
};

// What is the same for all runs of a batch. The work rule follows from the scheme and need not be set.
struct RunSettings : BatchSettings {
  std::shared_ptr<const Scheme> scheme;
  double fundamental_period = 0;  // s, the window of the residual drift
  bool error_check = true;
};

struct RunPlan : RunSettings, RunLength {};

// Whoever waits for a batch: may ask it to stop, and sees how many marches have come to an end.
struct BatchWatch {
  std::atomic<bool> stop = false;
  std::atomic<long> marches_ended = 0;
};

// How many marches a run takes: itself and its error check.
int marches_per_run(const RunSettings& settings);

// Marches tasks[i] into results[i], both of the same length. Everything of RunResult is filled but building, motion,
// factor and step_choice; wall_time is the batch's, shared out evenly. False when `watch` asked to stop: the results
// are then not whole. `watch` may be null. Never throws for what happens in a march: that is the result's status.
// Throws Error (input) when the scheme refuses the system.
//
// Step errors. The march is repeated at half the step (adaptive schemes: also at a hundredth of their tolerances). For
// a linear building and a scheme of order 2 the error of a peak is close to 4/3 of the difference (Richardson); with
// laws that yield, or order 1, twice the difference is given, as for a first-order method. A difference can vanish by
// chance at one story while its neighbors' do not: each peak takes the largest relative difference of three adjacent
// stories (or floors), itself in the middle where it can be. To this comes what a peak between two states may rise
// above the kept one (core/response/peaks.hpp). An estimate, not a bound: about one peak in a thousand of many random
// yielding sticks was farther off, by half as much again (tests/integrators/step_error_test.cpp asks for one in a
// hundred and twice). Where the repeated march ends otherwise (collapse in one of them) the errors are infinite.
bool run_many(const System& system, const RunSettings& settings, std::span<const RunTask> tasks,
              std::span<RunResult> results, BatchWatch* watch);

// One run alone.
RunResult run_once(const System& system, const Load& load, const RunPlan& plan);

}  // namespace pilotis
