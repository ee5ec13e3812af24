// What codes ask of suites, on invented spectra that are a stated multiple of the target.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"
#include "core/motion/target/asce_7_16.hpp"
#include "core/motion/target/asce_7_16_suite.hpp"
#include "core/motion/target/en_1998_suite.hpp"
#include "core/motion/target/table.hpp"

namespace pilotis {
namespace {

using enum ClauseResult;
const En1998Elastic code{2.0, En1998Type::type_1, En1998Ground::B, 0.05};

// Periods from 0.05 s, each 1.1 times the one before, to `last`; and the ends of the ranges asked for, so that no kink
// of the target has to be interpolated.
std::vector<double> periods_up_to(double last) {
  std::vector<double> periods{0.05};
  while (periods.back() * 1.1 <= last) periods.push_back(periods.back() * 1.1);
  for (const double end : {0.2, 2.0, 2.4, last}) periods.push_back(end);
  std::sort(periods.begin(), periods.end());
  return periods;
}

// Motions that are `multiples` of the target.
SuiteSpectra multiples_of(const TargetSpectrum& target, const std::vector<double>& multiples, double last) {
  SuiteSpectra suite{periods_up_to(last), {}};
  for (const double multiple : multiples) {
    suite.accelerations.emplace_back();
    for (const double period : suite.periods)
      suite.accelerations.back().push_back(multiple * target.acceleration(period));
  }
  return suite;
}

ClauseFinding finding(const std::vector<ClauseFinding>& findings, const std::string& clause,
                      const std::string& required = "") {
  for (const ClauseFinding& f : findings)
    if (f.clause.ends_with(clause) && f.required.find(required) != std::string::npos) return f;
  throw std::logic_error("no finding for " + clause);
}

En1998Suite en_suite(const std::vector<double>& multiples) {
  En1998Suite suite{multiples_of(code.spectrum(), multiples, 4), {}, AccelerogramKind::artificial, 1.0};
  for (const double multiple : multiples) suite.peak_accelerations.push_back(multiple * 2.4);  // a_g S
  return suite;
}

TEST(En1998Suite, JudgesClauseByClause) {
  const auto good = check_en_1998_suite(en_suite({0.8, 1.1, 1.2}), code, "suite");
  EXPECT_EQ(finding(good, "(4)a").result, holds);
  EXPECT_EQ(finding(good, "(4)b").result, holds);
  EXPECT_EQ(finding(good, "(4)b").found, "mean 2.48 m/s2, a_g S = 2.4 m/s2");
  EXPECT_EQ(finding(good, "(4)c").result, holds);
  EXPECT_EQ(finding(good, "3.2.3.1.2(2)P").result, cannot_be_judged);
  EXPECT_EQ(finding(good, "3.2.3.1.2(3)").result, cannot_be_judged);
  for (const ClauseFinding& f : good) EXPECT_TRUE(f.clause.starts_with("EN 1998-1:2004, ")) << f.clause;

  const auto two = check_en_1998_suite(en_suite({1, 1}), code, "suite");
  EXPECT_EQ(finding(two, "(4)a").result, does_not_hold);
  EXPECT_EQ(finding(two, "(4)a").found, "2 accelerograms");

  // Means of 0.95: enough for the spectrum, not at zero period. Of 0.89: for neither.
  const auto low = check_en_1998_suite(en_suite({0.9, 0.95, 1.0}), code, "suite");
  EXPECT_EQ(finding(low, "(4)b").result, does_not_hold);
  EXPECT_EQ(finding(low, "(4)c").result, holds);
  EXPECT_EQ(finding(check_en_1998_suite(en_suite({0.9, 0.9, 0.87}), code, "suite"), "(4)c").result, does_not_hold);
  EXPECT_EQ(finding(check_en_1998_suite(en_suite({0.9, 0.9, 0.9}), code, "suite"), "(4)c").result, holds);
}

TEST(En1998Suite, LooksAtTheWholeRangeAndOnlyThere) {
  // Range 0.2 to 2 s for T1 = 1 s. A dip inside counts, one outside does not.
  for (const auto& [period, result] : {std::pair{0.15, holds}, {0.7, does_not_hold}, {3.0, holds}}) {
    En1998Suite suite = en_suite({1, 1, 1});
    for (std::vector<double>& row : suite.spectra.accelerations)
      for (std::size_t i = 0; i < row.size(); ++i)
        if (std::abs(suite.spectra.periods[i] / period - 1) < 0.06) row[i] *= 0.5;
    EXPECT_EQ(finding(check_en_1998_suite(suite, code, "suite"), "(4)c").result, result) << period;
  }
  // A dip between the last period inside and the end of the range counts at the end.
  En1998Suite suite{{{0.1, 1.9, 2.1}, {{}, {}, {}}}, {3, 3, 3}, AccelerogramKind::artificial, 1.0};
  const TargetSpectrum target = code.spectrum();
  for (std::vector<double>& row : suite.spectra.accelerations)
    row = {20, target.acceleration(1.9), 0.5 * target.acceleration(2.1)};
  const ClauseFinding end = finding(check_en_1998_suite(suite, code, "suite"), "(4)c");
  EXPECT_EQ(end.result, does_not_hold);
  EXPECT_NE(end.found.find("at 2 s"), std::string::npos) << end.found;
}

TEST(En1998Suite, DoesNotJudgeWhatIsNotThere) {
  En1998Suite suite = en_suite({1, 1, 1});
  suite.fundamental_period = 2.5;  // to 5 s: neither the spectra nor the code go so far
  EXPECT_EQ(finding(check_en_1998_suite(suite, code, "suite"), "(4)c").result, cannot_be_judged);
  suite.spectra.periods.back() = 6;
  const ClauseFinding beyond = finding(check_en_1998_suite(suite, code, "suite"), "(4)c");
  EXPECT_EQ(beyond.result, cannot_be_judged);
  EXPECT_NE(beyond.found.find("the target is defined from 0 to 4 s"), std::string::npos) << beyond.found;
  suite.fundamental_period = 0.2;  // from 0.04 s: the spectra begin at 0.05 s
  EXPECT_EQ(finding(check_en_1998_suite(suite, code, "suite"), "(4)c").result, cannot_be_judged);
  suite.kind = AccelerogramKind::recorded_or_simulated;
  EXPECT_EQ(finding(check_en_1998_suite(suite, code, "suite"), "3.2.3.1.3(1)P").result, cannot_be_judged);
  EXPECT_THROW(finding(check_en_1998_suite(suite, code, "suite"), "3.2.3.1.2(3)"), std::logic_error);
}

TEST(En1998Suite, ComparesWithFivePercentWhateverTheTargetSays) {
  En1998Elastic twenty = code;
  twenty.damping = 0.2;
  EXPECT_EQ(finding(check_en_1998_suite(en_suite({0.8, 0.8, 0.8}), twenty, "suite"), "(4)c").result, does_not_hold);
}

TEST(En1998Suite, RefusesWhatDoesNotGoTogether) {
  En1998Suite suite = en_suite({1, 1, 1});
  suite.peak_accelerations.pop_back();
  EXPECT_THROW(check_en_1998_suite(suite, code, "suite"), Error);
  suite = en_suite({1, 1, 1});
  suite.fundamental_period = 0;
  EXPECT_THROW(check_en_1998_suite(suite, code, "suite"), Error);
  suite = en_suite({1, 1, 1});
  suite.spectra.accelerations[1].pop_back();
  EXPECT_THROW(check_en_1998_suite(suite, code, "suite"), Error);
  suite = en_suite({1, 1, 1});
  suite.spectra.periods[3] = suite.spectra.periods[2];
  EXPECT_THROW(check_en_1998_suite(suite, code, "suite"), Error);
  EXPECT_THROW(check_en_1998_suite({}, code, "suite"), Error);
}

TEST(En1998Suite, MeanResponseFromSevenMotions) {
  EXPECT_FALSE(en_1998_mean_response_allowed(6));
  EXPECT_TRUE(en_1998_mean_response_allowed(7));
}

const TargetSpectrum mcer = Asce716Mcer{{9.80665, 5.9, 8}}.spectrum();

Asce716Suite asce_suite(double multiple, std::size_t motions = 11) {
  return {multiples_of(mcer, std::vector<double>(motions, multiple), 10),
          MotionFit::amplitude_scaled,
          0.2,
          2.4,
          1.2,
          1.0,
          0.25};
}

TEST(Asce716Suite, JudgesClauseByClause) {
  const auto good = check_asce_7_16_suite(asce_suite(1.0), mcer, "suite");
  for (const ClauseFinding& f : good) {
    EXPECT_TRUE(f.clause.starts_with("ASCE/SEI 7-16, 16.2.")) << f.clause;
    EXPECT_NE(f.result, does_not_hold) << f.required << ": " << f.found;
  }
  EXPECT_EQ(finding(good, "16.2.2", "at least 11").result, holds);
  EXPECT_EQ(finding(good, "16.2.2", "tectonic").result, cannot_be_judged);
  EXPECT_EQ(finding(good, "16.2.3.1", "twice").result, holds);
  EXPECT_EQ(finding(good, "16.2.3.1", "20 %").result, holds);
  EXPECT_EQ(finding(good, "16.2.3.1", "mass").result, holds);
  EXPECT_EQ(finding(good, "16.2.3.2", "nowhere below 90 %").result, holds);
  EXPECT_EQ(finding(good, "16.2.3.2", "generally").result, cannot_be_judged);
  EXPECT_EQ(finding(check_asce_7_16_suite(asce_suite(1.0, 10), mcer, "suite"), "16.2.2", "at least 11").result,
            does_not_hold);
  EXPECT_EQ(finding(check_asce_7_16_suite(asce_suite(0.9), mcer, "suite"), "16.2.3.2", "nowhere").result, holds);
  EXPECT_EQ(finding(check_asce_7_16_suite(asce_suite(0.89), mcer, "suite"), "16.2.3.2", "nowhere").result,
            does_not_hold);
  EXPECT_TRUE(finding(check_asce_7_16_suite(asce_suite(0.95), mcer, "suite"), "16.2.3.2", "generally")
                  .found.starts_with("at or above it at 0 of "));
}

TEST(Asce716Suite, MatchedSuitesNeedAHundredAndTenPercent) {
  for (const auto& [multiple, result] : {std::pair{1.09, does_not_hold}, {1.1, holds}, {1.2, holds}}) {
    Asce716Suite suite = asce_suite(multiple);
    suite.fit = MotionFit::spectrally_matched;
    const auto findings = check_asce_7_16_suite(suite, mcer, "suite");
    EXPECT_EQ(finding(findings, "16.2.3.3").result, result) << multiple;
    EXPECT_THROW(finding(findings, "16.2.3.2"), std::logic_error);
  }
}

TEST(Asce716Suite, PeriodRange) {
  const auto result = [](double begin, double end, std::optional<double> mass, const std::string& required) {
    Asce716Suite suite = asce_suite(1);
    suite.range_begin = begin;
    suite.range_end = end;
    suite.period_of_90_percent_mass = mass;
    return finding(check_asce_7_16_suite(suite, mcer, "suite"), "16.2.3.1", required).result;
  };
  // First periods 1.2 and 1.0 s.
  EXPECT_EQ(result(0.2, 2.4, 0.25, "twice"), holds);
  EXPECT_EQ(result(0.2, 2.39, 0.25, "twice"), cannot_be_judged);
  EXPECT_EQ(result(0.2, 1.8, 0.25, "twice"), cannot_be_judged);
  EXPECT_EQ(result(0.2, 1.79, 0.25, "twice"), does_not_hold);
  EXPECT_EQ(result(0.21, 2.4, 0.25, "20 %"), does_not_hold);
  EXPECT_EQ(result(0.19, 2.4, 0.25, "20 %"), holds);
  EXPECT_EQ(result(0.2, 2.4, 0.19, "mass"), does_not_hold);
  EXPECT_EQ(result(0.2, 2.4, 0.2, "mass"), holds);
  EXPECT_EQ(result(0.2, 2.4, {}, "mass"), cannot_be_judged);
  Asce716Suite suite = asce_suite(1);
  suite.range_end = 0.1;
  EXPECT_THROW(check_asce_7_16_suite(suite, mcer, "suite"), Error);
  suite = asce_suite(1);
  suite.first_period_y = 0;
  EXPECT_THROW(check_asce_7_16_suite(suite, mcer, "suite"), Error);
}

}  // namespace
}  // namespace pilotis
