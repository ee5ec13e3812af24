// The n of many motions whose spectra have the mean and the spread that is wanted.
//
//     cost = sum_p w_p ((mean_m ln(k_m s_mp) - ln t_p)^2 + v (deviation_m ln(k_m s_mp) - sigma_p)^2) / sum_p w_p
//
// mean and deviation over the chosen motions (deviation with n - 1; 0 for one motion); v the weight of the spread; k_m
// the motion's own factor of least squares (scale_suite.hpp) or 1. From each of up to 50 motions, evenly spread over
// those offered: others are added one after the other, each time the one that makes the cost least; then chosen motions
// are exchanged for others as long as some exchange makes it less, the best exchange first. The best end of all these
// starts counts, of equal ones the earlier, so that the answer is the same on every run. It is a choice that no single
// exchange improves, not surely the best of all. Source: Jayaram, Lin & Baker 2011, Earthquake Spectra 27, 797 (greedy,
// with exchanges; from memory).
#pragma once

#include <string>
#include <vector>

#include "core/motion/fit/scale_suite.hpp"

namespace pilotis {

struct SelectionWish {
  std::size_t count = 0;                     // how many, at least 1
  std::vector<double> deviation = {};        // sigma_p, [period], >= 0, of ln; empty: 0, motions as alike as can be
  double spread_weight = 1;                  // v, >= 0
  bool scale_each = true;                    // k_m of least squares; false: as they are
  double least_factor = 0, most_factor = 0;  // motions whose k_m lies outside are left out; most 0: no limit
};

struct Selection {
  std::vector<std::size_t> motions;  // places in the problem, rising
  std::vector<double> factors;       // k_m of these
  double cost = 0;
};

// Throws Error (input) at `where` when the problem or the wish is not as above, or too few motions are left.
Selection select_motions(const FitProblem& problem, const SelectionWish& wish, const std::string& where);

// The cost of a given choice (places, at least one), for comparison.
double selection_cost(const FitProblem& problem, const SelectionWish& wish, const std::vector<std::size_t>& motions);

}  // namespace pilotis
