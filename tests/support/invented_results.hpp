// Results of an invented study to read, write and show: eight stories, five motions, three factors. No march made them;
// the numbers follow simple formulas, so that a test can say what must come out.
#pragma once

#include "core/verdict/limit.hpp"
#include "io/results/store.hpp"

namespace pilotis::invented {

inline constexpr int stories = 8;

// Story i has height 3.5 m (4.5 m at the ground); its drift ratio under motion m (0..4) at factor f is
// f (0.006 + 0.001 m) (1 - 0.08 |i - 3|) times (-1)^m; step error 1% of it. Nothing collapses.
double drift_ratio(int story, int motion, double factor);

// All runs done, factors 0.5, 1.0; histories for run 0: drift, floor_acceleration and base_shear at five instants.
StoredStudy calm_study();

// Factors 0.5, 1.0, 1.5; at 1.5 motion 4 collapses (story 3, 8.25 s).
StoredStudy study_with_collapse();

// As study_with_collapse(), and at 1.5 motion 2 does not converge (at 11.5 s).
StoredStudy study_with_open_run();

Limit drift_limit(Statistic statistic, double value);

}  // namespace pilotis::invented
