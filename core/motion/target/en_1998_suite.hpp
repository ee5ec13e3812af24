// What EN 1998-1:2004 asks of a suite of accelerograms, 3.2.3.1 (from memory).
#pragma once

#include "core/motion/target/en_1998.hpp"
#include "core/motion/target/suite_clauses.hpp"

namespace pilotis {

enum class AccelerogramKind { artificial, recorded_or_simulated };  // 3.2.3.1.2, 3.2.3.1.3

struct En1998Suite {
  SuiteSpectra spectra;                    // 5 % damped, of one horizontal component
  std::vector<double> peak_accelerations;  // m/s2, [motion]: the zero-period value of each spectrum
  AccelerogramKind kind = AccelerogramKind::artificial;
  double fundamental_period = 0;  // T1, s, > 0, in the direction in which the accelerogram is applied
};

// Clause by clause:
//   3.2.3.1.2(4)a  at least 3 accelerograms
//   3.2.3.1.2(4)b  mean of the zero-period values not smaller than a_g S
//   3.2.3.1.2(4)c  from 0.2 T1 to 2 T1 the mean 5 % damped spectrum nowhere below 90 % of the code's
//   and what needs an engineer: duration (artificial), qualification for the source and the site (recorded, simulated).
// The code's spectrum is taken with 5 % damping, whatever `target` says. Throws Error (input) at `where` when the
// numbers of motions differ or a value is not as above.
std::vector<ClauseFinding> check_en_1998_suite(const En1998Suite& suite, const En1998Elastic& target,
                                               const std::string& where);

// 4.3.3.4.3(3): with this many motions the mean of a response may be used; with fewer the most unfavorable value.
bool en_1998_mean_response_allowed(int motions);

}  // namespace pilotis
