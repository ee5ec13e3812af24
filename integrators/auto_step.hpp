// Picks the step of a march, and says why.
#pragma once

#include <string>
#include <vector>

#include "core/response/results.hpp"
#include "integrators/scheme.hpp"

namespace pilotis {

struct StepChoice {
  double step = 0;  // s
  std::string why;  // one line
};

// What the step is picked for.
struct StepNeeds {
  std::vector<Mode> modes;  // of the building, from the longest period
  double record_step = 0;   // s; 0: no record
  bool nonlinear = false;   // laws that yield: kinks within a step cost accuracy, so the first mode is resolved finer
};

// The largest step that divides the record's, is accurate (traits) in every mode needed to reach 99 % of the mass, and
// keeps a tenth of distance to the scheme's stability limit in the highest mode.
StepChoice choose_step(const Traits& traits, const StepNeeds& needs);

// A step the user chose, checked. Throws Error (input) when it passes the scheme's stability limit; the note says when
// it does not divide the record's or is rough for the modes that matter.
StepChoice check_step(const Traits& traits, const StepNeeds& needs, double step, const std::string& scheme);

}  // namespace pilotis
