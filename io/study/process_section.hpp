// The `process` list of a suite or of a motion: what is done to a record before it is used, in order.
//
//     process = [ { step = "pad", corner = "0.1 Hz" },
//                 { step = "bandpass", low = "0.1 Hz", high = "25 Hz", order = 4, pass = "acausal" } ]
//
// Step names, keys, units and ranges are those of core/motion/processing/registry.hpp.
#pragma once

#include <vector>

#include "core/motion/processing/registry.hpp"
#include "io/study/table_reader.hpp"

namespace pilotis {

// Throws Error (input) with file, line and key when this is no such list, a step or key is unknown (naming the
// nearest), a value is out of range, or the values of a step do not go together. An empty list is no steps. Each step's
// `where` is its place in the study.
std::vector<ProcessStep> read_process(const ValueReader& value);

}  // namespace pilotis
