// Records of (time, value) pairs, as digitized from film: read at their own times and, where these are uneven,
// interpolated to even ones.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "io/records/even_times.hpp"

namespace pilotis {

struct EvenSamples {
  double step = 0;             // s
  std::vector<double> values;  // in the unit of the pairs
  bool interpolated = false;   // then there may be more or fewer of them than pairs
  std::vector<std::string> notes;
};

// Where the times are even within their printed digits, the values as they stand. Else values read off the straight
// lines between the pairs, every `stated_step`, or, when nobody states one, every 0.02, 0.01, 0.005, 0.002 or 0.001 s:
// the largest that is not above the median spacing of the pairs (this program's choice; 0.02 s is what volume 2 of the
// same archives uses). Of pairs with the same time the last one counts. The first time becomes 0. Notes say all of it.
// Throws Error (input) when a time goes back, or the pairs would make more than a hundred samples each.
EvenSamples even_samples(TimeColumn column, std::vector<double> values, std::optional<double> stated_step,
                         const std::string& file);

}  // namespace pilotis
