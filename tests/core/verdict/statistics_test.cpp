#include "core/verdict/statistics.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <limits>
#include <random>
#include <vector>

namespace pilotis {
namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double nan = std::numeric_limits<double>::quiet_NaN();

// The values of runs; an infinite one is that of a run that collapsed, NaN of one that did not converge.
struct Column {
  explicit Column(const std::vector<double>& magnitudes, const std::vector<double>& errors = {}) {
    for (std::size_t i = 0; i < magnitudes.size(); ++i) {
      values.push_back({magnitudes[i], i < errors.size() ? errors[i] : 0});
      statuses.push_back(std::isinf(magnitudes[i])   ? RunStatus::collapsed
                         : std::isnan(magnitudes[i]) ? RunStatus::not_converged
                                                     : RunStatus::done);
    }
  }
  SuiteValue value(Statistic statistic, double percentile = 0) const {
    return suite_value({values, statuses}, statistic, percentile);
  }
  std::vector<PlaceValue> values;
  std::vector<RunStatus> statuses;
};

double percentile_of(const std::vector<double>& values, double percentile) {
  return Column(values).value(Statistic::percentile, percentile).value;
}

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
  EXPECT_DOUBLE_EQ(Column({1, 2, 6}).value(Statistic::mean).value, 3);
  EXPECT_EQ(Column({1, infinity}).value(Statistic::mean).value, infinity);
}

TEST(SuiteValue, StepErrors) {
  const Column column({3, 1, 2, 4}, {0.3, 0.6, 0.1, 0.2});
  EXPECT_DOUBLE_EQ(column.value(Statistic::mean).step_error, 0.3);        // (0.3+0.6+0.1+0.2)/4
  EXPECT_DOUBLE_EQ(column.value(Statistic::max).step_error, 0.2);         // of the run with 4
  EXPECT_DOUBLE_EQ(column.value(Statistic::median).step_error, 0.3);      // between 2 and 3: the larger
  EXPECT_DOUBLE_EQ(column.value(Statistic::percentile).step_error, 0.6);  // falls on 1
}

TEST(SuiteValue, RunsThatGaveNothingAreCountedAndLeftOut) {
  const SuiteValue suite = Column({2, nan, 4}).value(Statistic::mean);
  EXPECT_EQ(suite.open, 1);
  EXPECT_DOUBLE_EQ(suite.value, 3);
  EXPECT_DOUBLE_EQ(suite.at_least, 2);  // the third run gives 0 at least: (2 + 0 + 4) / 3
}

// With two open runs as zeros: 0, 0, 1, 2, 3: the median is 1, the 75th percentile (position 3) 2.
TEST(SuiteValue, OpenRunsCountAsZeroForWhatAPercentileIsAtLeast) {
  const Column column({3, nan, 1, nan, 2});
  EXPECT_DOUBLE_EQ(column.value(Statistic::median).at_least, 1);
  EXPECT_DOUBLE_EQ(column.value(Statistic::median).value, 2);
  EXPECT_DOUBLE_EQ(column.value(Statistic::percentile, 75).at_least, 2);
  EXPECT_DOUBLE_EQ(column.value(Statistic::percentile, 37.5).at_least, 0.5);  // position 1.5
}

// Against a plain sort, with ties, over many sizes.
TEST(Percentile, AsASortGivesIt) {
  std::mt19937 random(20261201);
  for (std::size_t n = 1; n < 200; n += 7) {
    std::vector<double> values(n);
    for (double& value : values) value = static_cast<double>(random() % 50);
    std::vector<double> sorted = values;
    std::sort(sorted.begin(), sorted.end());
    for (double p : {0.0, 16.0, 50.0, 84.0, 99.9, 100.0}) {
      const double position = static_cast<double>(n - 1) * p / 100;
      const auto lower = static_cast<std::size_t>(position), upper = std::min(lower + 1, n - 1);
      const double expected = sorted[lower] + (position - static_cast<double>(lower)) * (sorted[upper] - sorted[lower]);
      EXPECT_DOUBLE_EQ(percentile_of(values, p), expected) << n << " values, percentile " << p;
    }
  }
}

TEST(DoneValue, OfTheRunsThatWereDoneAlone) {
  const Column column({2, infinity, -5, nan}, {0.1, 0, 0.3, 0});
  const DoneValue found = done_value({column.values, column.statuses});
  EXPECT_EQ(found.largest, 5);
  EXPECT_EQ(found.step_error, 0.3);
  EXPECT_EQ(found.mean, 3.5);
  EXPECT_EQ(found.run, 2u);
  EXPECT_FALSE(done_value({}).run.has_value());
}

}  // namespace
}  // namespace pilotis
