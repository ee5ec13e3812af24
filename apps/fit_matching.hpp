// One record matched to the target spectra of a task, and how well it went.
#pragma once

#include <string>
#include <vector>

#include "apps/fit_options.hpp"
#include "core/motion/fit/match.hpp"

namespace pilotis {

struct MatchOptions {
  FitOptions fit{.command = "fit match", .matching = true};
  MatchSettings settings;
  double level = 1;       // this share of the target is matched
  bool unscaled = false;  // the record is not scaled to the target first
  std::string output;     // file, or folder for several records
};

struct EndOfGround {
  double velocity = 0, displacement = 0;  // m/s, m, when the ground has stopped
};

// How far a spectrum is from what was wanted, as a share of that.
struct MatchFit {
  double at_matched = 0, at_matched_period = 0;  // largest deviation at a matched period, s
  double between = 0, between_period = 0;        // on a grid eight times as fine
};

struct MatchedRecord {
  std::string file, digest;  // of the record given
  double factor = 1;         // applied before matching
  int iterations = 0;
  bool within_tolerance = false;
  Accelerogram given, record;          // as given; as it is written
  std::vector<MatchFit> fits;          // [target]
  EndOfGround end_given, end_matched;  // of the record given times the factor; of the matched one
};

constexpr int matched_decimals = 9;  // of m/s2, in the file

// Throws Error.
MatchedRecord match_file(const std::string& file, const MatchOptions& options, const FitTask& task);

// What the file's first lines say: how to make it again and what came out.
std::vector<std::string> remarks_of(const MatchedRecord& record, const MatchOptions& options, const FitTask& task);

// "5 %: 4.2 % at 0.31 s, between 6.3 % at 0.12 s".
std::string fit_text(const MatchFit& fit, double damping);

}  // namespace pilotis
