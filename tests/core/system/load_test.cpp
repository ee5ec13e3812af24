// The load over time, by hand. What a record does before its first and after its last sample is a convention of ours
// (see core/motion/accelerogram.hpp); PUBLISHED B states the first sample of El Centro at one step, the ground at rest
// at 0.
#include "core/system/load.hpp"

#include <gtest/gtest.h>

#include "core/system/assemble_stick.hpp"
#include "tests/core/system/sticks.hpp"

namespace pilotis {
namespace {

using namespace test;

System two_floors() { return assemble(linear_stick({2e4, 3e4}, {1e7, 1e7})); }

constexpr double tiny = 1e-13;  // rounding of the shares of a step, on accelerations of order 1

TEST(Load, FirstSampleAtZero) {
  const Accelerogram record{0.5, 0.0, {2.0, -1.0, 4.0}};
  const Load load(two_floors(), &record, 1.0, {});
  EXPECT_NEAR(load.ground(0), 2.0, tiny);
  EXPECT_NEAR(load.ground(0.25), 0.5, tiny);
  EXPECT_NEAR(load.ground(0.5), -1.0, tiny);
  EXPECT_NEAR(load.ground(0.9), 3.0, tiny);
  EXPECT_NEAR(load.ground(1.0), 4.0, tiny);
  EXPECT_NEAR(load.ground(1.125), 3.0, tiny);  // falls to zero within one step
  EXPECT_EQ(load.ground(1.5), 0);
  EXPECT_EQ(load.ground(1e6), 0);
  EXPECT_NEAR(load.end(), 1.5, tiny);
}

TEST(Load, FirstSampleAtOneStepRampsFromRest) {
  const Accelerogram record{0.5, 0.5, {2.0, -1.0}};
  const Load load(two_floors(), &record, 1.0, {});
  EXPECT_EQ(load.ground(0), 0);
  EXPECT_NEAR(load.ground(0.125), 0.5, tiny);
  EXPECT_NEAR(load.ground(0.5), 2.0, tiny);
  EXPECT_NEAR(load.ground(1.0), -1.0, tiny);
  EXPECT_NEAR(load.ground(1.25), -0.5, tiny);
  EXPECT_EQ(load.ground(1.5), 0);
  EXPECT_NEAR(load.end(), 1.5, tiny);
}

// n dt in doubles falls to either side of a sample's time; neither side may jump to a neighbor.
TEST(Load, GridTimesHitTheirSamples) {
  Accelerogram record{0.005, 0.0, {}};
  for (int i = 0; i < 4000; ++i) record.samples.push_back(i % 2 == 0 ? 1.0 : -1.0);
  const Load load(two_floors(), &record, 1.0, {});
  // n dt is right to one unit of its last place, 4e-15 s of 20 s; the slope is 2 in 0.005 s: 2e-12.
  for (int n = 0; n < 4000; ++n) EXPECT_NEAR(load.ground(n * 0.005), record.samples[n], 4e-12) << n;
}

TEST(Load, IsMinusMassTimesTheFactoredGround) {
  const Accelerogram record{0.5, 0.0, {2.0, -1.0}};
  const Load load(two_floors(), &record, 1.5, {});
  std::vector<double> p(2);
  load.at(0, p.data());
  EXPECT_NEAR(p[0], -2e4 * 3.0, 1e-9);
  EXPECT_NEAR(p[1], -3e4 * 3.0, 1e-9);
  EXPECT_NEAR(load.ground(0.5), -1.5, tiny);
  EXPECT_NEAR(load.largest(), 3e4 * 3.0, 1e-9);
}

TEST(Load, FloorForcesAreTables) {
  const FloorForce push{2, {1.0, 2.0, 4.0}, {100.0, 300.0, -100.0}};
  const Load load(two_floors(), nullptr, 1.0, {push});
  const auto roof = [&](double t) {
    std::vector<double> p(2);
    load.at(t, p.data());
    EXPECT_EQ(p[0], 0);
    return p[1];
  };
  EXPECT_EQ(roof(0.999), 0);           // zero before the first time,
  EXPECT_NEAR(roof(1.0), 100, 1e-11);  // where it is a sudden push
  EXPECT_NEAR(roof(1.5), 200, 1e-11);
  EXPECT_NEAR(roof(3.0), 100, 1e-11);
  EXPECT_NEAR(roof(4.0), -100, 1e-11);
  EXPECT_EQ(roof(4.001), 0);  // let go
  EXPECT_EQ(load.ground(2), 0);
  EXPECT_EQ(load.end(), 4.0);
  EXPECT_EQ(load.largest(), 300);
}

TEST(Load, ForcesOnOneFloorAddUpAndAddToTheGround) {
  const Accelerogram record{1.0, 0.0, {1.0, 1.0, 1.0}};
  const FloorForce one{1, {0.0, 9.0}, {5e4, 5e4}}, other{1, {0.0, 2.0}, {0.0, 2e4}};
  const Load load(two_floors(), &record, 1.0, {one, other});
  std::vector<double> p(2);
  load.at(1.0, p.data());
  EXPECT_NEAR(p[0], -2e4 + 5e4 + 1e4, 1e-9);
  EXPECT_NEAR(p[1], -3e4, 1e-9);
  EXPECT_EQ(load.end(), 9.0);  // the longer of the two
}

TEST(Load, NothingAtAll) {
  const Load load(two_floors(), nullptr, 1.0, {});
  std::vector<double> p{1, 1};
  load.at(0.3, p.data());
  EXPECT_EQ(p, (std::vector{0.0, 0.0}));
  EXPECT_EQ(load.end(), 0);
  EXPECT_EQ(load.largest(), 0);
}

}  // namespace
}  // namespace pilotis
