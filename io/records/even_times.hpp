// A column of times, as printed: does it rise evenly, and with what step?
#pragma once

#include <string>
#include <vector>

#include "io/records/number.hpp"

namespace pilotis {

struct TimeColumn {
  std::vector<double> times;  // in the unit of the file, at least two
  std::vector<int> lines;     // where each stands
  Precision finest;           // most decimals and most digits of any of them
};

struct EvenTimes {
  double step = 0;   // in the unit of the file, > 0; as printed where that fits, else the mean step
  double first = 0;  // exactly 0 or exactly one step when it is that within the printed digits
  double doubt = 0;  // by how much another step would fit the printed times as well
};

// A printed time may differ from the even one by the last digit it is printed with (as many decimals as the finest
// time, but no more digits than the longest), or by a millionth of the step (sums in the program that wrote it); never
// by half a step. Throws Error (input), naming line and times, when a time repeats, goes back, is missing or is uneven.
EvenTimes even_times(const TimeColumn& column, const std::string& file);

}  // namespace pilotis
