// Every processing step, listed once. A new step: its header in this folder, its name in registry.cpp; nothing else.
#pragma once

#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "core/motion/processing/step.hpp"

namespace pilotis {

// Names, summaries, and parameters with their ranges and units.
std::span<const Method> process_catalogue();

// A step as a study states it.
struct ProcessStep {
  std::string name;            // of the catalogue
  std::vector<double> values;  // SI, in the order of its Method::parameters
  std::string where;           // for messages: where it was stated
};

// Throws Error (input) at `where` when the name is unknown, a value is out of range or the values do not go together.
ProcessStep make_process_step(std::string_view name, std::span<const double> values, const std::string& where);

// The step applied to a valid accelerogram, which is not changed. Throws Error (input) at the step's `where` when the
// record does not allow it (a corner beyond its Nyquist frequency, say).
Processed process(const ProcessStep& step, const Accelerogram& record);

// All steps in their order.
struct ProcessedRecord {
  Accelerogram record;
  std::vector<std::string> done;  // one line for each step
};
ProcessedRecord process_all(std::span<const ProcessStep> steps, const Accelerogram& record);

}  // namespace pilotis
