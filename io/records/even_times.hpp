// A column of times, as printed: does it rise evenly, and with what step?
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "io/records/number.hpp"

namespace pilotis {

struct TimeColumn {
  std::vector<double> times;  // in the unit of the file, at least two
  std::vector<int> lines;     // where each stands
  std::string unit;           // for messages
  Precision finest;           // most decimals and most digits of any of them
};

struct EvenTimes {
  double step = 0;                  // in the unit of the file, > 0
  double first = 0;                 // exactly 0 or exactly one step when it is that within the printed digits
  bool finer_than_printed = false;  // the step was worked out from times that are rounded
};

// The step is the stated one (in the unit of the file); else the one that the printed times show; else, where the times
// are printed ten times finer than they rise, the one that fits them best (rounded to their decimals when that makes no
// difference of a last digit to the end). Printed times may differ from even ones by
// half a last digit (exactly half only when the step is stated, so that cut-off digits pass; one digit when the step is
// worked out), or by a millionth of the step (sums in the program that wrote them); never by half a step. The last
// digit is that of as many decimals as the finest time has, but no more digits than the longest.
//
// Throws Error (input), naming line and times, when a time repeats, goes back, is missing or is uneven, or when the
// times rise by another step than the stated one.
//
// The times must rise for the second, which gives nothing where the first would throw.
EvenTimes even_times(const TimeColumn& column, std::optional<double> stated_step, const std::string& file);
std::optional<EvenTimes> even_times_if_even(const TimeColumn& column, std::optional<double> stated_step);

}  // namespace pilotis
