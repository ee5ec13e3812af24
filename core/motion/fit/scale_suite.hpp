// Factors that bring the spectra of a suite to a target over a range of periods.
//
// Least squares of logarithms with weights w over the periods p; s spectral ordinates of motion m, t the target:
//
//     single factor for all:   least  sum_p w_p (ln(k mean_m s_mp) - ln t_p)^2,   mean: arithmetic, as codes take it
//                              ln k   = sum_p w_p ln(t_p / mean_m s_mp) / sum_p w_p
//     a factor for each:       ln k_m = sum_p w_p ln(t_p / s_mp) / sum_p w_p
//
// Then, where the mean is to stay at or above a fraction of the target at every period of weight > 0, all factors are
// lifted together by the least number that does it. Common practice; the logarithm makes half and twice equally wrong.
#pragma once

#include <string>
#include <vector>

namespace pilotis {

// Ordinates of one kind and unit (spectral accelerations, say) at the same periods. Those outside the range of interest
// have the weight 0 or are left out.
struct FitProblem {
  std::vector<std::vector<double>> ordinates;  // [motion][period], > 0
  std::vector<double> target;                  // [period], > 0
  std::vector<double> weights;                 // [period], >= 0, some > 0; empty: all alike
};
// Throws Error (input) at `where` when a field is not as above.
void validate(const FitProblem& problem, const std::string& where);

enum class Factors { single, each_motion };

struct ScaledSuite {
  std::vector<double> factors;  // [motion], lift included
  double lift = 1;              // >= 1
  double misfit = 0;            // root of the weighted mean of (ln of mean over target)^2, lift included
  double least = 0;             // least mean / target, lift included
  std::size_t least_at = 0;     // place of its period
};

// `never_below`: fraction of the target, 0 for none. Throws Error (input) at `where` for what is not a problem.
ScaledSuite scale_suite(const FitProblem& problem, Factors kind, double never_below, const std::string& where);

}  // namespace pilotis
