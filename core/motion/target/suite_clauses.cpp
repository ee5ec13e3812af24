#include "core/motion/target/suite_clauses.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr double last_bit = 1e-12;  // 0.2 T1 computed twice must find itself

double log_log(const std::vector<double>& x, const std::vector<double>& y, double at) {
  const auto above = std::lower_bound(x.begin(), x.end(), at);
  if (above == x.end()) return y.back();
  const auto i = static_cast<std::size_t>(above - x.begin());
  if (i == 0 || x[i] == at) return y[i];
  return y[i - 1] * std::pow(y[i] / y[i - 1], std::log(at / x[i - 1]) / std::log(x[i] / x[i - 1]));
}

std::vector<double> periods_within(const std::vector<double>& periods, double from, double to) {
  std::vector<double> within{from};
  for (const double period : periods)
    if (period > from && period < to) within.push_back(period);
  within.push_back(to);
  return within;
}

std::string what_is_missing(const SuiteSpectra& suite, const TargetSpectrum& target, double from, double to) {
  if (!(suite.periods.front() <= from * (1 + last_bit) && suite.periods.back() >= to * (1 - last_bit)))
    return fmt::format("the motions' spectra go from {:g} to {:g} s, the range from {:g} to {:g} s",
                       suite.periods.front(), suite.periods.back(), from, to);
  if (!(target.defined_at(from) && target.defined_at(to)))
    return fmt::format("the target is defined from {:g} to {:g} s, the range goes from {:g} to {:g} s",
                       target.shortest(), target.longest(), from, to);
  return "";
}

}  // namespace

std::string_view clause_result_word(ClauseResult result) {
  if (result == ClauseResult::cannot_be_judged) return "cannot be judged";
  return result == ClauseResult::holds ? "holds" : "does not hold";
}

void validate(const SuiteSpectra& suite, const std::string& where) {
  if (suite.periods.empty() || suite.accelerations.empty())
    throw input_error(where, "found no periods or no motions", "at least one of each is needed");
  for (std::size_t i = 0; i < suite.periods.size(); ++i)
    if (!std::isfinite(suite.periods[i]) || suite.periods[i] <= (i == 0 ? 0 : suite.periods[i - 1]))
      throw input_error(where, fmt::format("found period {} at {:g} s", i + 1, suite.periods[i]),
                        "periods must be greater than 0 s and rise");
  for (std::size_t m = 0; m < suite.accelerations.size(); ++m) {
    const std::vector<double>& row = suite.accelerations[m];
    const auto is_wrong = [](double a) { return !std::isfinite(a) || a <= 0; };
    if (row.size() != suite.periods.size() || std::any_of(row.begin(), row.end(), is_wrong))
      throw input_error(where,
                        fmt::format("the spectrum of motion {} has {} values for {} periods, or one that is not "
                                    "a number greater than 0",
                                    m + 1, row.size(), suite.periods.size()),
                        "give one spectral acceleration greater than 0 m/s2 for each period");
  }
}

std::vector<double> mean_accelerations(const SuiteSpectra& suite) {
  std::vector<double> mean(suite.periods.size(), 0.0);
  for (const std::vector<double>& row : suite.accelerations)
    for (std::size_t i = 0; i < mean.size(); ++i) mean[i] += row[i];
  for (double& value : mean) value /= static_cast<double>(suite.accelerations.size());
  return mean;
}

std::optional<OverRange> mean_over_target(const SuiteSpectra& suite, const TargetSpectrum& target, double from,
                                          double to, std::string& missing) {
  missing = what_is_missing(suite, target, from, to);
  if (!missing.empty()) return std::nullopt;
  const std::vector<double> mean = mean_accelerations(suite), periods = periods_within(suite.periods, from, to);
  OverRange range{0, 0, static_cast<int>(periods.size()), 0};
  for (const double period : periods) {
    const double ratio = log_log(suite.periods, mean, period) / target.acceleration(period);
    if (range.at == 0 || ratio < range.least) range = {ratio, period, range.periods, range.at_or_above};
    if (ratio >= 1 - last_bit) ++range.at_or_above;
  }
  return range;
}

ClauseFinding mean_not_below(std::string clause, std::string required, const SuiteSpectra& suite,
                             const TargetSpectrum& target, double from, double to, double fraction) {
  ClauseFinding finding{std::move(clause), std::move(required)};
  const auto range = mean_over_target(suite, target, from, to, finding.found);
  if (!range) return finding;
  finding.result = range->least >= fraction * (1 - last_bit) ? ClauseResult::holds : ClauseResult::does_not_hold;
  finding.found = fmt::format(
      "least mean over target {:.4g} at {:.4g} s, asked for {:g}; looked at {} periods from {:.4g} "
      "to {:.4g} s",
      range->least, range->at, fraction, range->periods, from, to);
  return finding;
}

}  // namespace pilotis
