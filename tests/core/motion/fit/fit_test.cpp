// Scaling and selection on invented ordinates with answers in closed form.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <random>

#include "core/error.hpp"
#include "core/motion/fit/scale_suite.hpp"
#include "core/motion/fit/select_motions.hpp"

namespace pilotis {
namespace {

constexpr double eps = std::numeric_limits<double>::epsilon();

// Mean of 1, 4 and 3, 4 is 2, 4; over the target 4, 2 that is 1/2, 2.
const FitProblem two{{{1, 4}, {3, 4}}, {4, 2}, {}};

TEST(ScaleSuite, SingleFactorOfTheMean) {
  const ScaledSuite suite = scale_suite(two, Factors::single, 0, "fit");
  EXPECT_NEAR(suite.factors[0], 1, 4 * eps);  // (ln 2 + ln 1/2) / 2 = 0
  EXPECT_NEAR(suite.factors[1], 1, 4 * eps);
  EXPECT_EQ(suite.lift, 1);
  EXPECT_NEAR(suite.misfit, std::log(2), 4 * eps);
  EXPECT_NEAR(suite.least, 0.5, 4 * eps);
  EXPECT_EQ(suite.least_at, 0u);
}

TEST(ScaleSuite, WeightsCount) {
  FitProblem problem = two;
  problem.weights = {3, 1};  // ln k = (3 ln 2 - ln 2) / 4
  EXPECT_NEAR(scale_suite(problem, Factors::single, 0, "fit").factors[0], std::sqrt(2), 4 * eps);
  problem.weights = {0, 1};  // the second period alone
  const ScaledSuite suite = scale_suite(problem, Factors::single, 0.9, "fit");
  EXPECT_NEAR(suite.factors[0], 0.5, 4 * eps);
  EXPECT_NEAR(suite.misfit, 0, 4 * eps);
  EXPECT_EQ(suite.least_at, 1u);
  EXPECT_EQ(suite.lift, 1);
}

TEST(ScaleSuite, AFactorForEachMotion) {
  const ScaledSuite suite = scale_suite(two, Factors::each_motion, 0, "fit");
  EXPECT_NEAR(suite.factors[0], std::sqrt(4.0 / 1 * 2 / 4), 4 * eps);
  EXPECT_NEAR(suite.factors[1], std::sqrt(4.0 / 3 * 2 / 4), 4 * eps);
}

TEST(ScaleSuite, IsLiftedUntilTheMeanIsNowhereTooLow) {
  const ScaledSuite suite = scale_suite(two, Factors::single, 0.9, "fit");
  EXPECT_NEAR(suite.lift, 1.8, 10 * eps);
  EXPECT_NEAR(suite.factors[0], 1.8, 10 * eps);
  EXPECT_NEAR(suite.least, 0.9, 10 * eps);
  EXPECT_NEAR(suite.misfit, std::sqrt((std::pow(std::log(0.9), 2) + std::pow(std::log(3.6), 2)) / 2), 10 * eps);
  EXPECT_EQ(scale_suite(two, Factors::single, 0.4, "fit").lift, 1);
}

// Of all factors this one has the least misfit.
TEST(ScaleSuite, IsTheLeastOfItsNeighbors) {
  std::mt19937 random(3);
  FitProblem problem{{}, {}, {}};
  for (int p = 0; p < 20; ++p) problem.target.push_back(1 + static_cast<double>(random() % 1000) / 100);
  for (int m = 0; m < 7; ++m) {
    problem.ordinates.emplace_back();
    for (int p = 0; p < 20; ++p) problem.ordinates.back().push_back(0.1 + static_cast<double>(random() % 1000) / 100);
  }
  const ScaledSuite best = scale_suite(problem, Factors::single, 0, "fit");
  for (const double other : {0.99, 1.01}) {
    double sum = 0;
    for (int p = 0; p < 20; ++p) {
      double mean = 0;
      for (int m = 0; m < 7; ++m) mean += problem.ordinates[m][p] / 7;
      sum += std::pow(std::log(other * best.factors[0] * mean / problem.target[p]), 2);
    }
    EXPECT_GT(std::sqrt(sum / 20), best.misfit);
    EXPECT_NEAR(sum / 20, best.misfit * best.misfit + std::pow(std::log(other), 2), 1e-12);
  }
}

TEST(ScaleSuite, RefusesWhatIsNoProblem) {
  const auto refused = [](const FitProblem& problem, double never_below = 0) {
    EXPECT_THROW(scale_suite(problem, Factors::single, never_below, "fit"), Error);
  };
  refused({});
  refused({{{1, 2}}, {1}, {}});
  refused({{{1, 0}}, {1, 2}, {}});
  refused({{{1, 1}}, {1, 0}, {}});
  refused({{{1, 1}}, {1, 1}, {1}});
  refused({{{1, 1}}, {1, 1}, {0, 0}});
  refused({{{1, 1}}, {1, 1}, {-1, 2}});
  refused({{{1, 1}}, {1, 1}, {}}, -1);
}

// Target 1 everywhere; among others, exp(+d) and exp(-d) with the wanted deviation of d sqrt(2): cost 0.
TEST(SelectMotions, FindsTheOnesThatFitExactly) {
  const double d = 0.3;
  const auto flat = [](double log, double tilt) {
    return std::vector{std::exp(log + tilt), std::exp(log), std::exp(log - tilt)};
  };
  const FitProblem problem{
      {flat(1, 0.5), flat(0.05, 0.2), flat(d, 0), flat(-0.9, 0), flat(-d, 0), flat(0.02, -0.4)}, {1, 1, 1}, {}};
  SelectionWish wish{2, std::vector(3, d * std::sqrt(2)), 1, false, 0, 0};
  const Selection found = select_motions(problem, wish, "fit");
  EXPECT_EQ(found.motions, (std::vector<std::size_t>{2, 4}));
  EXPECT_EQ(found.factors, (std::vector<double>{1, 1}));
  EXPECT_NEAR(found.cost, 0, 1e-15);
  // As alike as can be, each scaled to the target: the two without tilt again, and the one of least tilt.
  wish = {4, {}, 1, true, 0, 0};
  EXPECT_EQ(select_motions(problem, wish, "fit").motions, (std::vector<std::size_t>{1, 2, 3, 4}));
  EXPECT_NEAR(select_motions(problem, wish, "fit").factors[2], std::exp(0.9), 1e-14);
  // exp(0.9) = 2.46 is too much.
  wish.most_factor = 2;
  EXPECT_EQ(select_motions(problem, wish, "fit").motions, (std::vector<std::size_t>{1, 2, 4, 5}));
  wish.least_factor = 0.9;
  EXPECT_THROW(select_motions(problem, wish, "fit"), Error);
}

FitProblem invented(std::mt19937& random, std::size_t motions, std::size_t periods) {
  FitProblem problem{{}, std::vector<double>(periods, 2.0), {}};
  for (std::size_t m = 0; m < motions; ++m) {
    problem.ordinates.emplace_back();
    for (std::size_t p = 0; p < periods; ++p)
      problem.ordinates.back().push_back(2 * std::exp(static_cast<double>(random()) / 2147483648.0 - 1));
  }
  return problem;
}

// The cost by its definition.
double by_hand(const FitProblem& problem, const SelectionWish& wish, const std::vector<std::size_t>& motions) {
  double cost = 0;
  const auto n = static_cast<double>(motions.size());
  for (std::size_t p = 0; p < problem.target.size(); ++p) {
    double mean = 0, variance = 0;
    for (const std::size_t m : motions) mean += std::log(problem.ordinates[m][p] / problem.target[p]) / n;
    for (const std::size_t m : motions)
      variance += std::pow(std::log(problem.ordinates[m][p] / problem.target[p]) - mean, 2) / (n - 1);
    cost += mean * mean + wish.spread_weight * std::pow(std::sqrt(variance) - wish.deviation[p], 2);
  }
  return cost / static_cast<double>(problem.target.size());
}

TEST(SelectMotions, NoExchangeMakesItBetter) {
  std::mt19937 random(5);
  for (int trial = 0; trial < 10; ++trial) {
    const FitProblem problem = invented(random, 14, 6);
    const SelectionWish wish{4, std::vector(6, 0.4), 0.7, false, 0, 0};
    const Selection found = select_motions(problem, wish, "fit");
    EXPECT_EQ(found.motions, select_motions(problem, wish, "fit").motions);
    ASSERT_NEAR(found.cost, by_hand(problem, wish, found.motions), 1e-13);
    for (std::size_t out = 0; out < 4; ++out)
      for (std::size_t in = 0; in < 14; ++in) {
        if (std::find(found.motions.begin(), found.motions.end(), in) != found.motions.end()) continue;
        std::vector<std::size_t> other = found.motions;
        other[out] = in;
        ASSERT_GE(by_hand(problem, wish, other), found.cost - 2e-10);
      }
  }
}

TEST(SelectMotions, AllOfThemAndOneOfThem) {
  std::mt19937 random(9);
  const FitProblem problem = invented(random, 5, 3);
  SelectionWish wish{5, {}, 0, false, 0, 0};
  EXPECT_EQ(select_motions(problem, wish, "fit").motions, (std::vector<std::size_t>{0, 1, 2, 3, 4}));
  wish.count = 1;
  const Selection one = select_motions(problem, wish, "fit");
  for (std::size_t m = 0; m < 5; ++m) EXPECT_GE(selection_cost(problem, wish, {m}), one.cost);
  wish.count = 6;
  EXPECT_THROW(select_motions(problem, wish, "fit"), Error);
  wish = {2, {0.1}, 1, false, 0, 0};
  EXPECT_THROW(select_motions(problem, wish, "fit"), Error);
  wish = {2, {}, -1, false, 0, 0};
  EXPECT_THROW(select_motions(problem, wish, "fit"), Error);
}

}  // namespace
}  // namespace pilotis
