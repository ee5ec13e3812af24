#include "core/verdict/statistics.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>

namespace pilotis {
namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double nan = std::numeric_limits<double>::quiet_NaN();

// NIST/SEMATECH e-Handbook of Statistical Methods, section 7.2.6.2 "Percentiles": twelve measurements, and the remark
// that some packages set position 1 + p (N - 1), which is type 7. Measurements from memory. By hand: 1 + 0.9 * 11
// = 10.9, between the tenth (95.1937) and the eleventh (95.1959) of the sorted values: 95.19568, 95.1957 as the
// handbook rounds.
TEST(Percentile, OfTheMeasurementsOfTheNistHandbook) {
  const std::vector<double> measured{95.1772, 95.1567, 95.1937, 95.1959, 95.1442, 95.0610,
                                     95.1591, 95.1195, 95.1065, 95.0925, 95.1990, 95.1682};
  EXPECT_NEAR(percentile_of(measured, 90), 95.1937 + 0.9 * (95.1959 - 95.1937), 1e-12);
  EXPECT_NEAR(percentile_of(measured, 90), 95.19568, 5e-6);
}

// Documented examples of numpy.percentile / numpy.quantile, whose default "linear" is type 7:
// a = [[10, 7, 4], [3, 2, 1]], np.percentile(a, 50) = 3.5.
TEST(Percentile, OfTheExampleInTheNumpyManual) { EXPECT_DOUBLE_EQ(percentile_of({10, 7, 4, 3, 2, 1}, 50), 3.5); }

TEST(Percentile, EndsAndMiddleByHand) {
  const std::vector<double> values{15, 20, 35, 40, 50};
  EXPECT_DOUBLE_EQ(percentile_of(values, 0), 15);
  EXPECT_DOUBLE_EQ(percentile_of(values, 100), 50);
  EXPECT_DOUBLE_EQ(percentile_of(values, 50), 35);
  EXPECT_DOUBLE_EQ(percentile_of(values, 40), 29);    // position 1.6: 20 + 0.6 * 15
  EXPECT_DOUBLE_EQ(percentile_of(values, 84), 43.6);  // position 3.36: 40 + 0.36 * 10
  EXPECT_DOUBLE_EQ(percentile_of({7}, 84), 7);
  EXPECT_TRUE(std::isnan(percentile_of({}, 50)));
}

TEST(Percentile, InfiniteValuesNeverGiveNaN) {
  EXPECT_DOUBLE_EQ(percentile_of({1, 2, infinity}, 50), 2);  // falls on 2: the infinite one does not touch it
  EXPECT_EQ(percentile_of({1, 2, infinity}, 84), infinity);  // falls between 2 and infinity
  EXPECT_EQ(percentile_of({1, infinity, infinity}, 84), infinity);
}

TEST(Mean, ByHand) {
  EXPECT_DOUBLE_EQ(mean_of(std::vector<double>{1, 2, 6}), 3);
  EXPECT_EQ(mean_of(std::vector<double>{1, infinity}), infinity);
}

RunPeak peak(double magnitude, double error) { return {nullptr, magnitude, error, magnitude}; }

TEST(SuiteValue, StepErrors) {
  const std::vector<RunPeak> peaks{peak(3, 0.3), peak(1, 0.6), peak(2, 0.1), peak(4, 0.2)};
  EXPECT_DOUBLE_EQ(suite_value(peaks, Statistic::mean, 0).step_error, 0.3);        // (0.3+0.6+0.1+0.2)/4
  EXPECT_DOUBLE_EQ(suite_value(peaks, Statistic::max, 0).step_error, 0.2);         // of the run with 4
  EXPECT_DOUBLE_EQ(suite_value(peaks, Statistic::median, 0).step_error, 0.3);      // between 2 and 3: the larger
  EXPECT_DOUBLE_EQ(suite_value(peaks, Statistic::percentile, 0).step_error, 0.6);  // falls on 1
}

TEST(SuiteValue, RunsThatGaveNothingAreCountedAndLeftOut) {
  const std::vector<RunPeak> peaks{peak(2, 0), peak(nan, nan), peak(4, 0)};
  const SuiteValue suite = suite_value(peaks, Statistic::mean, 0);
  EXPECT_EQ(suite.open, 1);
  EXPECT_DOUBLE_EQ(suite.value, 3);
  EXPECT_DOUBLE_EQ(suite.at_least, 2);  // the third run gives 0 at least: (2 + 0 + 4) / 3
}

}  // namespace
}  // namespace pilotis
