// What a file states about its numbers, and how that goes with what a study states: both may, but not differently, and
// what neither states is never guessed in silence.
#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

// A fact and the line that states it.
struct StatedUnit {
  std::string unit;
  int line = 0;
};
struct StatedTime {
  double seconds = 0;
  int line = 0;
};
struct Statements {
  std::optional<StatedUnit> unit;
  std::optional<StatedTime> step, first_sample_at;
};

// Note a fact. `what` names it, e.g. "the step". Throw Error (input) when an earlier line of the file states another.
void state_unit(Statements& statements, StatedUnit found, const std::string& file);
void state_time(std::optional<StatedTime>& stated, StatedTime found, const std::string& what, const std::string& file);

// One of the two, or Error (input) when they differ or there is none (no error for the first sample: 0 with a note).
std::string agreed_unit(const Statements& file_says, const RecordHints& study_says, const std::string& file);
double agreed_step(const Statements& file_says, const RecordHints& study_says, const std::string& file);
double agreed_first_sample(const Statements& file_says, const RecordHints& study_says, double step,
                           const std::string& file, std::vector<std::string>& notes);

// True when the two times differ by less than a billionth.
bool same_time(double a, double b);

}  // namespace pilotis
