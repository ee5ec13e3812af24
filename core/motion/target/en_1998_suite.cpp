#include "core/motion/target/en_1998_suite.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numeric>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr std::size_t fewest = 3;
constexpr int enough_for_the_mean = 7;
constexpr double fraction = 0.9, first_part = 0.2, last_part = 2;

std::string clause(std::string_view number) { return fmt::format("EN 1998-1:2004, {}", number); }

ClauseFinding number_of_motions(const En1998Suite& suite) {
  const std::size_t count = suite.spectra.accelerations.size();
  return {clause("3.2.3.1.2(4)a"), "at least 3 accelerograms",
          count >= fewest ? ClauseResult::holds : ClauseResult::does_not_hold, fmt::format("{} accelerograms", count)};
}

ClauseFinding zero_period(const En1998Suite& suite, const TargetSpectrum& code) {
  const auto& peaks = suite.peak_accelerations;
  const double mean = std::accumulate(peaks.begin(), peaks.end(), 0.0) / static_cast<double>(peaks.size());
  const double asked = code.acceleration(0);  // a_g S
  return {clause("3.2.3.1.2(4)b"), "mean of the zero-period accelerations not smaller than a_g S",
          mean >= asked ? ClauseResult::holds : ClauseResult::does_not_hold,
          fmt::format("mean {:.4g} m/s2, a_g S = {:.4g} m/s2", mean, asked)};
}

std::vector<ClauseFinding> for_an_engineer(AccelerogramKind kind) {
  const std::string not_from_spectra = "spectra do not tell";
  if (kind == AccelerogramKind::artificial)
    return {{clause("3.2.3.1.2(2)P"), "duration consistent with the magnitude and the other features behind a_g",
             ClauseResult::cannot_be_judged, not_from_spectra},
            {clause("3.2.3.1.2(3)"), "without site-specific data, a stationary part of at least 10 s",
             ClauseResult::cannot_be_judged, not_from_spectra}};
  return {{clause("3.2.3.1.3(1)P"),
           "qualified for the features of the sources and the soil at the site, values scaled to a_g S of the zone",
           ClauseResult::cannot_be_judged, not_from_spectra}};
}

void require_suite(const En1998Suite& suite, const std::string& where) {
  validate(suite.spectra, where);
  if (suite.peak_accelerations.size() != suite.spectra.accelerations.size())
    throw input_error(where,
                      fmt::format("found {} peak accelerations for {} spectra", suite.peak_accelerations.size(),
                                  suite.spectra.accelerations.size()),
                      "one for each motion is needed");
  if (!std::isfinite(suite.fundamental_period) || suite.fundamental_period <= 0)
    throw input_error(where, fmt::format("found a fundamental period of {:g} s", suite.fundamental_period),
                      "it must be greater than 0 s");
}

}  // namespace

std::vector<ClauseFinding> check_en_1998_suite(const En1998Suite& suite, const En1998Elastic& target,
                                               const std::string& where) {
  require_suite(suite, where);
  En1998Elastic five_percent = target;
  five_percent.damping = 0.05;
  const TargetSpectrum code = five_percent.spectrum();
  const double T1 = suite.fundamental_period;
  std::vector<ClauseFinding> findings{
      number_of_motions(suite), zero_period(suite, code),
      mean_not_below(clause("3.2.3.1.2(4)c"),
                     "from 0.2 T1 to 2 T1 the mean 5 % damped spectrum nowhere below 90 % of the elastic spectrum",
                     suite.spectra, code, first_part * T1, last_part * T1, fraction)};
  for (ClauseFinding& finding : for_an_engineer(suite.kind)) findings.push_back(std::move(finding));
  return findings;
}

bool en_1998_mean_response_allowed(int motions) { return motions >= enough_for_the_mean; }

}  // namespace pilotis
