// A target spectrum as the user's own table: site-specific, of a National Annex, of another code.
#pragma once

#include <span>

#include "core/motion/target/target.hpp"

namespace pilotis {

enum class Between { log_log, linear };  // straight in the logarithms of both, or in the numbers themselves

struct TargetTable {
  std::vector<double> periods;        // s, rising, at least two; > 0 for log_log, >= 0 for linear
  std::vector<double> accelerations;  // m/s2, as many, > 0
  double damping = 0.05;              // fraction of critical, of these accelerations
  Between between = Between::log_log;
  std::string source;  // where the table comes from, with the edition of a code; not empty
};

// Defined from the first to the last period, nowhere else. Throws Error (input) at `where` when a field is not as
// above.
TargetSpectrum target_from(const TargetTable& table, const std::string& where);

}  // namespace pilotis
