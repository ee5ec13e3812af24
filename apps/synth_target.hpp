// The target spectrum that a made motion follows, as `pilotis synth` takes it.
#pragma once

#include "apps/synth_file.hpp"
#include "apps/target_option.hpp"

namespace pilotis {

struct SynthTarget {
  TypedTarget typed;
  std::string from = "0.05 s", to = "3 s";  // of a named target; a table has its own first and last period
};

void add_synth_target_options(CLI::App& command, SynthTarget& target);

// Adds the target as a curve, how it was given, and its one line. A named target is taken on the periods where the
// motion will be held to it. `damping`: fraction of critical. Throws Error (input).
void add_target(const SynthTarget& target, double damping, SynthRecipe& recipe);

}  // namespace pilotis
