// Trilinear spring against hand calculation. k = 4e6 N/m, f_c = 8e3 N (at 2 mm), cracked slope k/4 = 1e6 N/m to
// f_y = 1.4e4 N (at 8 mm), then k/40 = 1e5 N/m.
#include <gtest/gtest.h>

#include "tests/core/laws/legal_law.hpp"

namespace pilotis {
namespace {

using namespace test;

constexpr double k = 4e6, tiny = 1e-9;

Walker<Trilinear> spring(double post_yield) { return {Trilinear{k, 8e3, 0.25, 1.4e4, post_yield}}; }

// The skeleton by hand.
double skeleton(double d, double post_yield) {
  const double size = std::abs(d);
  double force = k * size;
  if (size > 0.002) force = 8e3 + 1e6 * (size - 0.002);
  if (size > 0.008) force = 1.4e4 + post_yield * k * (size - 0.008);
  return std::copysign(force, d);
}

class TrilinearSpring : public ::testing::TestWithParam<double> {};

TEST_P(TrilinearSpring, LoadsAlongItsSkeleton) {
  Walker<Trilinear> s = spring(GetParam());
  EXPECT_NEAR(s.go(0.002).force, 8e3, tiny);
  EXPECT_NEAR(s.go(0.005).force, 1.1e4, tiny);
  EXPECT_NEAR(s.go(0.008).force, 1.4e4, tiny);
  EXPECT_NEAR(s.go(0.018).force, 1.4e4 + GetParam() * k * 0.01, tiny);
}

TEST_P(TrilinearSpring, HasThreeSlopes) {
  const Walker<Trilinear> s = spring(GetParam());
  for (const double sign : {1.0, -1.0}) {
    EXPECT_NEAR(s.peek(sign * 0.0019).tangent, k, 1e-13 * k);
    EXPECT_NEAR(s.peek(sign * 0.0021).tangent, 1e6, 1e-13 * k);
    EXPECT_NEAR(s.peek(sign * 0.0079).tangent, 1e6, 1e-13 * k);
    EXPECT_NEAR(s.peek(sign * 0.0081).tangent, GetParam() * k, 1e-13 * k);
  }
}

// Masing's first rule (1926): after a reversal at (d0, f0), (f - f0)/2 follows the skeleton at (d - d0)/2. Second rule:
// a branch that meets the one of an earlier turn goes on along that one.
TEST_P(TrilinearSpring, ReversesAlongTheSkeletonEnlargedTwice) {
  const double r = GetParam();
  Walker<Trilinear> s = spring(r);
  const double d0 = 0.020, f0 = s.go(d0).force;
  for (const double d : {0.019, 0.0165, 0.010, 0.0045, 0.0, -0.015}) {
    EXPECT_NEAR(s.peek(d).force, f0 + 2 * skeleton((d - d0) / 2, r), tiny);
  }
  const double d1 = 0.007, f1 = s.go(d1).force;
  for (const double d : {0.0075, 0.012, 0.018}) EXPECT_NEAR(s.peek(d).force, f1 + 2 * skeleton((d - d1) / 2, r), tiny);
  EXPECT_NEAR(s.go(d0).force, f0, tiny);                     // the inner loop closes
  EXPECT_NEAR(s.go(0.025).force, skeleton(0.025, r), tiny);  // and the skeleton goes on
  EXPECT_NEAR(s.go(-0.025).force, skeleton(-0.025, r), tiny);
}

INSTANTIATE_TEST_SUITE_P(Ratios, TrilinearSpring, ::testing::Values(0.025, 0.0, -0.05));

TEST(TrilinearSpring, YieldDeformationIsWhereTheThirdSlopeStarts) {
  EXPECT_DOUBLE_EQ(yield_deformation(spring(0).law), 0.008);
  EXPECT_DOUBLE_EQ(initial_stiffness(spring(0).law), k);
}

}  // namespace
}  // namespace pilotis
