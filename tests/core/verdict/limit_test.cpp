#include "core/verdict/limit.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>

#include "core/verdict/memory_table.hpp"

namespace pilotis {
namespace {

constexpr double nan = std::numeric_limits<double>::quiet_NaN();

const Quantity& quantity(const char* name) { return *find_quantity(name); }

struct Results {
  std::vector<BuildingSummary> buildings;
  std::vector<RunResult> runs;
};

Verdict judge(const Results& results, const std::vector<Limit>& limits) {
  return judge(MemoryTable(results.buildings, results.runs), limits);
}

// A two-story building, stories 3 m and 4 m, without runs.
Results two_stories() {
  Results results;
  results.buildings.resize(1);
  results.buildings[0].heights = {3, 4};
  results.buildings[0].masses = {1, 1};
  return results;
}

// A run with these drift ratios (with sign) and an error for both.
RunResult run(const char* motion, double lower, double upper, double error, double factor = 1) {
  const ResponseLayout layout(2);
  RunResult made;
  made.motion = motion;
  made.factor = factor;
  made.peaks.resize(layout.size());
  made.peaks[layout.offset(quantity("drift_ratio"))] = {lower, 1, error};
  made.peaks[layout.offset(quantity("drift_ratio")) + 1] = {upper, 2, error};
  return made;
}

RunResult ended(RunResult run, RunStatus status) {
  run.status = status;
  return run;
}

Limit limit(Statistic statistic, double value, double percentile = 0) {
  return {&quantity("drift_ratio"), statistic, percentile, value, "invented", {}};
}

Outcome only(const Results& results, const Limit& one) {
  const Verdict verdict = judge(results, {one});
  EXPECT_EQ(verdict.outcomes.size(), 1u);
  return verdict.outcomes.at(0);
}

// Story 1: 1, 2, 3 %; story 2: 2, 2.5, 0.9 %. By hand: means 2 and 1.8, maxima 3 and 2.5, medians 2 and 2.
Results three_runs() {
  Results results = two_stories();
  results.runs = {run("A", 0.010, -0.020, 0), run("B", -0.020, 0.025, 0), run("C", 0.030, 0.009, 0)};
  return results;
}

TEST(Judge, MagnitudesNotSignsCount) {
  const Outcome outcome = only(three_runs(), limit(Statistic::mean, 0.025));
  EXPECT_NEAR(outcome.value, 0.02, 1e-15);
  EXPECT_EQ(outcome.place, 1);
  EXPECT_EQ(outcome.motion, "C");
  EXPECT_NEAR(outcome.margin, 0.2, 1e-12);  // (0.025 - 0.02) / 0.025
  EXPECT_EQ(outcome.finding, Finding::holds);
}

TEST(Judge, LargestAndPercentile) {
  EXPECT_DOUBLE_EQ(only(three_runs(), limit(Statistic::max, 0.02)).value, 0.03);
  EXPECT_EQ(only(three_runs(), limit(Statistic::max, 0.02)).finding, Finding::exceeded);
  // Position 2 * 0.75 = 1.5: story 1 between 2 and 3 %: 2.5 %; story 2 between 2 and 2.5 %: 2.25 %.
  EXPECT_NEAR(only(three_runs(), limit(Statistic::percentile, 0.02, 75)).value, 0.025, 1e-15);
  EXPECT_DOUBLE_EQ(only(three_runs(), limit(Statistic::median, 0.02)).value, 0.02);
}

TEST(Judge, EqualToTheLimitIsNotAboveIt) {
  const Outcome outcome = only(three_runs(), limit(Statistic::max, 0.03));
  EXPECT_FALSE(outcome.exceeded);
}

TEST(Judge, EachFactorByItself) {
  Results results = three_runs();
  results.runs.push_back(run("A", 0.05, 0.01, 0, 2));
  const Verdict verdict = judge(results, {limit(Statistic::max, 0.04)});
  ASSERT_EQ(verdict.outcomes.size(), 2u);
  EXPECT_EQ(verdict.outcomes[0].finding, Finding::holds);
  EXPECT_EQ(verdict.outcomes[1].finding, Finding::exceeded);
  EXPECT_EQ(verdict.outcomes[1].runs, 1);
  EXPECT_EQ(exit_status(verdict), 1);
  Limit first_only = limit(Statistic::max, 0.04);
  first_only.factors = {1};
  EXPECT_EQ(exit_status(judge(results, {first_only})), 0);
}

TEST(Judge, TooCloseOnBothSidesWithinTheStepError) {
  Results results = two_stories();
  results.runs = {run("A", 0.0199, 0, 0.0002)};
  EXPECT_EQ(only(results, limit(Statistic::max, 0.02)).finding, Finding::too_close);
  EXPECT_FALSE(only(results, limit(Statistic::max, 0.02)).exceeded);
  EXPECT_EQ(only(results, limit(Statistic::max, 0.0198)).finding, Finding::too_close);
  EXPECT_TRUE(only(results, limit(Statistic::max, 0.0198)).exceeded);
  EXPECT_EQ(only(results, limit(Statistic::max, 0.0202)).finding, Finding::holds);
  EXPECT_EQ(only(results, limit(Statistic::max, 0.0196)).finding, Finding::exceeded);
}

TEST(Judge, UnknownStepErrorIsNotTooClose) {
  Results results = two_stories();
  results.runs = {run("A", 0.0199, 0, nan)};
  EXPECT_EQ(only(results, limit(Statistic::max, 0.02)).finding, Finding::holds);
}

TEST(Judge, CollapsedRunIsBeyondEveryLimit) {
  Results results = three_runs();
  results.runs[0] = ended(run("A", 0.02, 0.101, nan), RunStatus::collapsed);
  const Outcome mean = only(results, limit(Statistic::mean, 1));
  EXPECT_TRUE(std::isinf(mean.value));
  EXPECT_EQ(mean.finding, Finding::exceeded);
  EXPECT_EQ(mean.place, 2);  // where the collapsed run had gone furthest
  EXPECT_EQ(mean.motion, "A");
  EXPECT_EQ(mean.collapsed, 1);
  // Medians: story 1 of 2, 3 %, infinity: 3 %; story 2 of 0.9, 2.5 %, infinity: 2.5 %.
  const Outcome median = only(results, limit(Statistic::median, 0.035));
  EXPECT_DOUBLE_EQ(median.value, 0.03);
  EXPECT_EQ(median.finding, Finding::holds);
  EXPECT_EQ(exit_status(judge(results, {limit(Statistic::median, 0.035)})), 1) << "a run collapsed";
}

TEST(Judge, CollapsedRunWithoutLimitsStillCounts) {
  Results results = three_runs();
  results.runs[0].status = RunStatus::collapsed;
  EXPECT_EQ(exit_status(judge(results, {})), 1);
  EXPECT_EQ(exit_status(judge(three_runs(), {})), 0);
}

TEST(Judge, OpenRunLeavesTheLimitUndetermined) {
  Results results = three_runs();
  results.runs[2] = ended(run("C", 0.5, 0.5, nan), RunStatus::not_converged);
  const Outcome outcome = only(results, limit(Statistic::max, 0.03));
  EXPECT_EQ(outcome.finding, Finding::undetermined);
  EXPECT_DOUBLE_EQ(outcome.value, 0.025) << "the open run's own peak must not enter";
  EXPECT_EQ(outcome.not_converged, 1);
  EXPECT_EQ(exit_status(judge(results, {limit(Statistic::max, 0.03)})), 3);
}

TEST(Judge, OpenRunDoesNotHideAnExceededLimit) {
  Results results = three_runs();
  results.runs[2].status = RunStatus::not_converged;
  EXPECT_EQ(only(results, limit(Statistic::max, 0.024)).finding, Finding::exceeded);
  // Mean of the two others at story 2: 2.25 %; with the open run at 0 it would be 1.5 %.
  EXPECT_EQ(only(results, limit(Statistic::mean, 0.0149)).finding, Finding::exceeded);
  EXPECT_EQ(only(results, limit(Statistic::mean, 0.0151)).finding, Finding::undetermined);
  EXPECT_EQ(exit_status(judge(results, {limit(Statistic::max, 0.024)})), 3);
}

TEST(Judge, PeakThatIsNoNumberIsNeverPassedOver) {
  Results results = three_runs();
  results.runs[0] = run("A", nan, 0.001, 0);
  EXPECT_EQ(only(results, limit(Statistic::max, 0.04)).finding, Finding::undetermined);
  EXPECT_EQ(exit_status(judge(results, {limit(Statistic::max, 0.04)})), 3);
}

TEST(Judge, FactorWithoutRunsIsUndetermined) {
  Limit absent = limit(Statistic::max, 0.04);
  absent.factors = {3};
  const Outcome outcome = only(three_runs(), absent);
  EXPECT_EQ(outcome.finding, Finding::undetermined);
  EXPECT_EQ(outcome.runs, 0);
}

TEST(Judge, WholeRunQuantityHasNoPlace) {
  Results results = three_runs();
  results.runs[1].peaks[ResponseLayout(2).offset(quantity("base_shear"))] = {-5e6, 1, 1e3};
  const Outcome outcome = only(results, {&quantity("base_shear"), Statistic::max, 0, 4e6, "", {}});
  EXPECT_EQ(outcome.place, 0);
  EXPECT_EQ(outcome.motion, "B");
  EXPECT_DOUBLE_EQ(outcome.value, 5e6);
}

TEST(Judge, ResidualDriftRatioOverTheStoryHeight) {
  Results results = three_runs();
  for (RunResult& one : results.runs) {
    one.residual_drift = {0.003, -0.008};
    one.residual_error = {0.0003, 0.0004};
  }
  const Outcome outcome = only(results, {&residual_drift_ratio(), Statistic::mean, 0, 0.005, "", {}});
  EXPECT_DOUBLE_EQ(outcome.value, 0.002);        // 8 mm / 4 m
  EXPECT_DOUBLE_EQ(outcome.step_error, 0.0001);  // 0.4 mm / 4 m
  EXPECT_EQ(outcome.place, 2);
}

// The second building has one story and drifts twice as far: its own outcome, its own place.
TEST(Judge, EachBuildingByItself) {
  Results results = three_runs();
  results.buildings.emplace_back();
  results.buildings[1].heights = {5};
  RunResult other;
  other.building = 1;
  other.motion = "A";
  other.peaks.resize(ResponseLayout(1).size());
  other.peaks[ResponseLayout(1).offset(quantity("drift_ratio"))] = {-0.06, 1, 0};
  results.runs.push_back(other);
  const Verdict verdict = judge(results, {limit(Statistic::max, 0.04)});
  ASSERT_EQ(verdict.outcomes.size(), 2u);
  EXPECT_EQ(verdict.outcomes[0].building, 0);
  EXPECT_EQ(verdict.outcomes[0].finding, Finding::holds);
  EXPECT_EQ(verdict.outcomes[0].runs, 3);
  EXPECT_EQ(verdict.outcomes[1].building, 1);
  EXPECT_EQ(verdict.outcomes[1].finding, Finding::exceeded);
  EXPECT_DOUBLE_EQ(verdict.outcomes[1].value, 0.06);
  EXPECT_EQ(verdict.outcomes[1].place, 1);
  Limit at_two = limit(Statistic::max, 0.04);
  at_two.factors = {2};
  EXPECT_EQ(judge(results, {at_two}).outcomes.size(), 2u) << "undetermined for each building";
}

}  // namespace
}  // namespace pilotis
