#include "core/motion/fit/scale_suite.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numeric>

#include "core/error.hpp"

namespace pilotis {

namespace {

bool all_positive(const std::vector<double>& values) {
  return std::all_of(values.begin(), values.end(), [](double v) { return std::isfinite(v) && v > 0; });
}

double weight(const FitProblem& problem, std::size_t p) { return problem.weights.empty() ? 1 : problem.weights[p]; }

// Weighted mean over the periods of f(period).
template <class F>
double mean_over_periods(const FitProblem& problem, F f) {
  double sum = 0, weights = 0;
  for (std::size_t p = 0; p < problem.target.size(); ++p) {
    sum += weight(problem, p) * f(p);
    weights += weight(problem, p);
  }
  return sum / weights;
}

double fitting_factor(const FitProblem& problem, const std::vector<double>& spectrum) {
  return std::exp(mean_over_periods(problem, [&](std::size_t p) { return std::log(problem.target[p] / spectrum[p]); }));
}

std::vector<double> mean_spectrum(const FitProblem& problem, const std::vector<double>& factors) {
  std::vector<double> mean(problem.target.size(), 0.0);
  for (std::size_t m = 0; m < factors.size(); ++m)
    for (std::size_t p = 0; p < mean.size(); ++p) mean[p] += factors[m] * problem.ordinates[m][p];
  for (double& value : mean) value /= static_cast<double>(factors.size());
  return mean;
}

// Fills in `least` and `least_at`.
void find_least(const FitProblem& problem, const std::vector<double>& mean, ScaledSuite& suite) {
  bool found = false;
  for (std::size_t p = 0; p < mean.size(); ++p) {
    if (weight(problem, p) == 0) continue;
    const double ratio = mean[p] / problem.target[p];
    if (found && ratio >= suite.least) continue;
    suite.least = ratio;
    suite.least_at = p;
    found = true;
  }
}

}  // namespace

void validate(const FitProblem& problem, const std::string& where) {
  const std::size_t periods = problem.target.size();
  if (periods == 0 || problem.ordinates.empty() || !all_positive(problem.target))
    throw input_error(where, fmt::format("found {} motions and {} target ordinates", problem.ordinates.size(), periods),
                      "at least one of each is needed, and targets greater than 0");
  for (std::size_t m = 0; m < problem.ordinates.size(); ++m)
    if (problem.ordinates[m].size() != periods || !all_positive(problem.ordinates[m]))
      throw input_error(where,
                        fmt::format("motion {} has {} ordinates for {} periods, or one that is not greater than 0",
                                    m + 1, problem.ordinates[m].size(), periods),
                        "give one ordinate greater than 0 for each period");
  const auto& weights = problem.weights;
  const bool usable = std::all_of(weights.begin(), weights.end(), [](double w) { return std::isfinite(w) && w >= 0; });
  const double sum = std::accumulate(weights.begin(), weights.end(), 0.0);
  if (!weights.empty() && (weights.size() != periods || !usable || sum <= 0))
    throw input_error(where,
                      fmt::format("found {} weights for {} periods, with the sum {:g}", weights.size(), periods, sum),
                      "give one weight of at least 0 for each period, not all 0");
}

ScaledSuite scale_suite(const FitProblem& problem, Factors kind, double never_below, const std::string& where) {
  validate(problem, where);
  if (!std::isfinite(never_below) || never_below < 0)
    throw input_error(where, fmt::format("found {:g} of the target as the least mean", never_below),
                      "it must be at least 0");
  ScaledSuite suite;
  suite.factors.assign(problem.ordinates.size(), 1.0);
  if (kind == Factors::single)
    suite.factors.assign(problem.ordinates.size(), fitting_factor(problem, mean_spectrum(problem, suite.factors)));
  else
    for (std::size_t m = 0; m < suite.factors.size(); ++m)
      suite.factors[m] = fitting_factor(problem, problem.ordinates[m]);
  find_least(problem, mean_spectrum(problem, suite.factors), suite);
  suite.lift = std::max(1.0, never_below / suite.least);
  for (double& factor : suite.factors) factor *= suite.lift;
  const std::vector<double> mean = mean_spectrum(problem, suite.factors);
  find_least(problem, mean, suite);
  suite.misfit = std::sqrt(mean_over_periods(problem, [&](std::size_t p) {
    const double error = std::log(mean[p] / problem.target[p]);
    return error * error;
  }));
  return suite;
}

}  // namespace pilotis
