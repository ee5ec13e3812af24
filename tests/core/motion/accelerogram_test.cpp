#include "core/motion/accelerogram.hpp"

#include <gtest/gtest.h>

#include <limits>

#include "core/error.hpp"

namespace pilotis {
namespace {

std::string problem_of(const Accelerogram& record) {
  try {
    validate(record, "motion.csv");
  } catch (const Error& e) {
    EXPECT_EQ(e.kind(), ErrorKind::input);
    EXPECT_EQ(e.where(), "motion.csv");
    return e.problem();
  }
  return "";
}

TEST(Accelerogram, TakesWhatItsHeaderAllows) {
  EXPECT_EQ(problem_of({0.02, 0, {0, 1}}), "");
  EXPECT_EQ(problem_of({0.02, 0.02, {0, 1, -1}}), "");
}

TEST(Accelerogram, RefusesEverythingElseAndNamesIt) {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  const double inf = std::numeric_limits<double>::infinity();
  EXPECT_NE(problem_of({0, 0, {0, 1}}).find("step of 0 s"), std::string::npos);
  EXPECT_NE(problem_of({-0.01, 0, {0, 1}}).find("-0.01 s"), std::string::npos);
  EXPECT_NE(problem_of({nan, 0, {0, 1}}).find("nan"), std::string::npos);
  EXPECT_NE(problem_of({inf, 0, {0, 1}}).find("inf"), std::string::npos);
  EXPECT_NE(problem_of({0.02, 0.01, {0, 1}}).find("first sample at 0.01 s"), std::string::npos);
  EXPECT_NE(problem_of({0.02, nan, {0, 1}}).find("nan"), std::string::npos);
  EXPECT_NE(problem_of({0.02, 0, {}}).find("0 sample(s)"), std::string::npos);
  EXPECT_NE(problem_of({0.02, 0, {1}}).find("1 sample(s)"), std::string::npos);
  EXPECT_NE(problem_of({0.02, 0, {1, nan, 2}}).find("sample 2 of 3"), std::string::npos);
  EXPECT_NE(problem_of({0.02, 0, {1, 2, -inf}}).find("sample 3 of 3"), std::string::npos);
}

TEST(Accelerogram, PeakKeepsItsSignAndTime) {
  const PeakSample peak = peak_of({0.5, 0.5, {1, -4, 3, 4}});
  EXPECT_EQ(peak.value, -4);  // the first of equal ones
  EXPECT_EQ(peak.time, 1.0);
}

TEST(Accelerogram, DurationIsTheTimeOfTheLastSample) {
  EXPECT_EQ((Accelerogram{0.5, 0, {1, 2, 3}}.duration()), 1.0);
  EXPECT_EQ((Accelerogram{0.5, 0.5, {1, 2, 3}}.duration()), 1.5);
}

}  // namespace
}  // namespace pilotis
