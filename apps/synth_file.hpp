// A made motion as a CSV file whose first lines say how it was made.
#pragma once

#include <filesystem>
#include <string>

#include "core/motion/synthetic/kind.hpp"

namespace pilotis {

// How a motion was made: enough to make it again.
struct SynthRecipe {
  const SyntheticKind* kind = nullptr;
  std::vector<double> values;              // SI, in the order of the kind's parameters
  std::vector<Curve> curves;               // in the order of the kind's tables
  std::vector<std::string> curve_options;  // how each is given on the command line; empty where not given
  std::vector<std::string> notes;          // what the target is, one line
  SyntheticGrid grid;
};

// The command that made the motion, every value written out.
std::string command_line(const SynthRecipe& recipe);

// Comment lines (how it was made, what was derived, peak, step, tables), then a row for each sample.
std::string csv_of(const MadeMotion& motion, const SynthRecipe& recipe);

// "2001 samples every 0.01 s, peak 3.432328 m/s2".
std::string short_facts(const Accelerogram& record);

// Whole or not at all. Throws Error when `file` is a folder or stands in none.
void write_csv(const std::filesystem::path& file, const std::string& csv);

}  // namespace pilotis
