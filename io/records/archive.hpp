// What the readers of all archives do alike once they have the numbers of a component.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "io/records/record.hpp"
#include "io/records/stated.hpp"

namespace pilotis {

// The peak a header states, as a check on the reading.
struct StatedPeak {
  double value = 0;       // in the unit of the samples
  double last_digit = 0;  // one unit of the last digit it is printed with
  int line = 0;           // of the file
};

// From a printed number; empty when `token` is none.
std::optional<StatedPeak> stated_peak(std::string_view token, int line);

// The value of largest magnitude, with its sign; 0 of none.
double largest_of(const std::vector<double>& values);

// One component as read from a file of an archive.
struct ReadComponent {
  std::string name;
  std::optional<int> channel = {};
  std::vector<double> values;  // in the unit of the file
  Statements says;             // unit and step
  std::optional<StatedPeak> peak = {};
  std::optional<double> peak_found = {};  // where `values` are interpolated: that of the numbers of the file
  std::optional<std::size_t> stated_samples = {};
};

// In m/s2, unit and step agreed with the study's hints, the first sample at 0 unless the study says otherwise.
//
// The peak of the samples is compared with the header's: within 1 % and the printed digit nothing is said; within 10 %,
// or when the header's is negative and the samples' positive (a positive one may be meant as a size), there is a note;
// beyond, the file is refused, for then its numbers are not what the header describes (damaged, cut, or in another
// unit). The two percentages are this program's choice.
RecordComponent finished(ReadComponent read, const RecordHints& hints, const std::string& where);

// A fact as the header states it, shouted units as the unit library knows them. Throw Error (input) at the line.
StatedUnit unit_stated(std::string_view text, int line);
StatedTime step_stated(std::string_view token, int line, const std::string& file);
StatedTime rate_stated(std::string_view samples_per_second, int line, const std::string& file);

// Throws Error (input): the file holds something else than an acceleration.
[[noreturn]] void refuse_quantity(const std::string& where, const std::string& quantity);

}  // namespace pilotis
