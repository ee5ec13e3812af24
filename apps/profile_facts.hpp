// What the screen and the JSON report say of a study, as numbers: made once, shown twice.
#pragma once

#include <string>
#include <vector>

#include "core/verdict/limit.hpp"
#include "core/verdict/run_table.hpp"

namespace pilotis {

// The largest magnitude over the runs of a set that were done. All NaN when none was.
struct Largest {
  double value = 0;       // SI, magnitude
  double step_error = 0;  // SI; NaN: not estimated
  double mean = 0;        // SI, of the magnitudes over the motions
  int place = 0;          // story or floor, from 1; 0 for whole-run quantities
  std::string motion;
};

struct StoryFacts {
  int story = 1;
  std::string label;
  Largest drift_ratio, residual_drift_ratio, ductility, story_shear;
  double statistic =
      0;  // the named limit's statistic of the drift ratio at this story; infinite with collapsed runs; NaN: none
  double margin = 0;  // (limit - statistic) / limit; NaN: no limit
};

// Of one building at one factor.
struct SetFacts {
  int building = 0;
  double factor = 1;
  int runs = 0, done = 0, collapsed = 0, not_converged = 0;
  const Limit* limit = nullptr;     // the first drift_ratio limit for this factor; nullptr: none
  std::vector<StoryFacts> stories;  // from the ground up
  Largest base_shear, roof_displacement, floor_acceleration, overturning_moment;
};

// Points at one of `limits`.
SetFacts set_facts(const RunTable& table, const RunSet& set, const std::vector<Limit>& limits);

// The largest drift ratio over the stories of the runs that were done.
Largest largest_drift_ratio(const RunTable& table, const RunSet& set);

struct Bulk {
  double height = 0, weight = 0;  // m, N
};
Bulk bulk_of(const BuildingSummary& building);

// How all runs were marched.
struct MarchFacts {
  std::string scheme;                       // of the first run
  double least_step = 0, largest_step = 0;  // s
  double energy_error = 0;                  // largest, fraction of the input
};
MarchFacts march_facts(const RunTable& table);

}  // namespace pilotis
