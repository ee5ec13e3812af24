// What a code asks of a suite of motions, clause by clause, and whether a suite does it.
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/motion/target/target.hpp"

namespace pilotis {

enum class ClauseResult { holds, does_not_hold, cannot_be_judged };
std::string_view clause_result_word(ClauseResult result);  // "holds", "does not hold", "cannot be judged"

struct ClauseFinding {
  std::string clause;    // code with edition, and clause
  std::string required;  // in our words
  ClauseResult result = ClauseResult::cannot_be_judged;
  std::string found = {};  // the numbers, with units; why it cannot be judged
};

// Response spectra of the motions as they are to be used, factors applied.
struct SuiteSpectra {
  std::vector<double> periods;                     // s, rising, > 0
  std::vector<std::vector<double>> accelerations;  // spectral acceleration, m/s2, [motion][period], > 0
};
// Throws Error (input) at `where` when a field is not as above or there is no motion.
void validate(const SuiteSpectra& suite, const std::string& where);

// Arithmetic mean over the motions at each period, m/s2.
std::vector<double> mean_accelerations(const SuiteSpectra& suite);

// Mean over target from period `from` to `to` (s): at the suite's own periods inside, and at
// both ends, where the mean is taken log-log between its neighbors (have both ends among the periods to be exact).
// Empty when suite or target do not reach so far; then `missing` says which.
struct OverRange {
  double least = 0;     // of mean / target
  double at = 0;        // s, where
  int periods = 0;      // how many were looked at
  int at_or_above = 0;  // at how many of them mean / target >= 1
};
std::optional<OverRange> mean_over_target(const SuiteSpectra& suite, const TargetSpectrum& target, double from,
                                          double to, std::string& missing);

// The finding that mean / target is at least `fraction` over the range; a shortfall of 1e-12 of it is rounding.
ClauseFinding mean_not_below(std::string clause, std::string required, const SuiteSpectra& suite,
                             const TargetSpectrum& target, double from, double to, double fraction);

}  // namespace pilotis
