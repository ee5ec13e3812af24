// Records for `pilotis motion`: which files are meant, and the components in them. The one place that knows how
// io/records hands them out.
#pragma once

#include <string>
#include <vector>

#include "io/records/record.hpp"

namespace pilotis {

// One component of a file.
struct ReadComponent {
  std::string name;                // as the file calls it; empty when it does not say
  std::string format, unit;        // of the file
  std::vector<std::string> notes;  // what was assumed
  Accelerogram record;             // m/s2
};

// All components of a file in its order, or the one that hints.component names. Throws Error.
std::vector<ReadComponent> components_of(const std::string& file, const RecordHints& hints);

// The files that paths and patterns mean, each once, in the order typed. A path without a file, and a pattern without a
// match, stands for itself: who opens it says what is wrong.
std::vector<std::string> files_meant(const std::vector<std::string>& typed);

}  // namespace pilotis
