#include "core/motion/target/asce_7_16_suite.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr std::size_t fewest = 11;
constexpr double last_bit = 1e-12;  // 0.2 T computed twice must find itself

std::string clause(std::string_view number) { return fmt::format("ASCE/SEI 7-16, {}", number); }
ClauseResult judged(bool holds) { return holds ? ClauseResult::holds : ClauseResult::does_not_hold; }

ClauseFinding number_of_motions(const Asce716Suite& suite) {
  const std::size_t count = suite.maximum_direction.accelerations.size();
  return {clause("16.2.2"), "at least 11 ground motions", judged(count >= fewest), fmt::format("{} motions", count)};
}

ClauseFinding selection() {
  return {clause("16.2.2"),
          "from events of the tectonic regime, magnitudes, distances and spectral shape that control the target",
          ClauseResult::cannot_be_judged, "spectra do not tell"};
}

ClauseFinding upper_end(const Asce716Suite& suite) {
  const double longest = std::max(suite.first_period_x, suite.first_period_y), ratio = suite.range_end / longest;
  ClauseResult result = judged(ratio >= 2 * (1 - last_bit));
  std::string found = fmt::format("up to {:g} s, {:.4g} times {:g} s", suite.range_end, ratio, longest);
  if (result == ClauseResult::does_not_hold && ratio >= 1.5 * (1 - last_bit)) {
    result = ClauseResult::cannot_be_judged;
    found += "; allowed where dynamic analysis justifies it";
  }
  return {clause("16.2.3.1"), "period range up to at least twice the longer first-mode period", result, found};
}

ClauseFinding lower_end(const Asce716Suite& suite) {
  const double shortest = std::min(suite.first_period_x, suite.first_period_y), ratio = suite.range_begin / shortest;
  return {clause("16.2.3.1"), "period range from at most 20 % of the shorter first-mode period",
          judged(ratio <= 0.2 * (1 + last_bit)),
          fmt::format("from {:g} s, {:.4g} % of {:g} s", suite.range_begin, 100 * ratio, shortest)};
}

ClauseFinding mass_in_range(const Asce716Suite& suite) {
  ClauseFinding finding{clause("16.2.3.1"), "period range includes the modes of 90 % of the mass in each direction"};
  if (!suite.period_of_90_percent_mass) {
    finding.found = "the modes are not known";
    return finding;
  }
  const double period = *suite.period_of_90_percent_mass;
  finding.result = judged(suite.range_begin <= period * (1 + last_bit));
  finding.found = fmt::format("from {:g} s, the last mode needed at {:g} s", suite.range_begin, period);
  return finding;
}

ClauseFinding generally_above(const Asce716Suite& suite, const TargetSpectrum& target) {
  ClauseFinding finding{clause("16.2.3.2"),
                        "mean of the maximum-direction spectra generally matches or exceeds the target"};
  const auto range =
      mean_over_target(suite.maximum_direction, target, suite.range_begin, suite.range_end, finding.found);
  if (range)
    finding.found = fmt::format("at or above it at {} of {} periods; \"generally\" is for an engineer to judge",
                                range->at_or_above, range->periods);
  return finding;
}

void require_suite(const Asce716Suite& suite, const std::string& where) {
  validate(suite.maximum_direction, where);
  if (!(suite.range_begin > 0 && suite.range_end > suite.range_begin))
    throw input_error(where,
                      fmt::format("found a period range from {:g} to {:g} s", suite.range_begin, suite.range_end),
                      "it must begin above 0 s and end later");
  if (!(suite.first_period_x > 0 && suite.first_period_y > 0))
    throw input_error(
        where, fmt::format("found first-mode periods of {:g} and {:g} s", suite.first_period_x, suite.first_period_y),
        "both must be greater than 0 s");
}

}  // namespace

std::vector<ClauseFinding> check_asce_7_16_suite(const Asce716Suite& suite, const TargetSpectrum& target,
                                                 const std::string& where) {
  require_suite(suite, where);
  std::vector<ClauseFinding> findings{number_of_motions(suite), selection(), upper_end(suite), lower_end(suite),
                                      mass_in_range(suite)};
  const auto mean_at_least = [&](std::string_view number, std::string required, double fraction) {
    findings.push_back(mean_not_below(clause(number), std::move(required), suite.maximum_direction, target,
                                      suite.range_begin, suite.range_end, fraction));
  };
  if (suite.fit == MotionFit::spectrally_matched) {
    mean_at_least("16.2.3.3", "mean of the maximum-direction spectra at or above 110 % of the target over the range",
                  1.1);
    return findings;
  }
  findings.push_back(generally_above(suite, target));
  mean_at_least("16.2.3.2", "mean of the maximum-direction spectra nowhere below 90 % of the target in the range", 0.9);
  return findings;
}

}  // namespace pilotis
