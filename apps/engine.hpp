// Runs a whole study: one building, every motion at every factor.
#pragma once

#include <functional>

#include "core/response/results.hpp"
#include "core/system/system.hpp"
#include "io/study/study.hpp"

namespace pilotis {

// Called after each run with the number of runs done and that of all; false asks to stop.
using RunWatch = std::function<bool(long done, long all)>;

// All motions at the first factor, then at the next; a study without motions is one run of factor 1 under "none".
// `stopped` tells that the watch asked to stop: the runs are then not all there. Throws Error (input) when the study
// asks for what its building or scheme cannot do; what happens inside a march is that run's status.
struct StudyRun {
  StudyResults results;
  bool stopped = false;
};
StudyRun run_study(const Study& study, const RunWatch& watch);

// How many runs a study is.
long run_count(const Study& study);

}  // namespace pilotis
