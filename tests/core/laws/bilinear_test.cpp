// Bilinear and linear springs against hand calculation, with round numbers: k = 2e6 N/m, f_y = 1e4 N, u_y = 5 mm.
#include <gtest/gtest.h>

#include <numbers>

#include "tests/core/laws/legal_law.hpp"

namespace pilotis {
namespace {

using namespace test;

constexpr double k = 2e6, f_y = 1e4, u_y = 0.005;
constexpr double tiny = 1e-9;  // N; rounding of forces of 1e4 N is 2e-12 N a step

Walker<Bilinear> spring(double r) { return {Bilinear{k, f_y, r}}; }

TEST(LinearSpring, IsHookesLaw) {
  Walker<Linear> spring{Linear{k}};
  EXPECT_DOUBLE_EQ(spring.go(0.003).force, 6000);
  EXPECT_DOUBLE_EQ(spring.go(-0.5).force, -1e6);
  EXPECT_EQ(spring.go(0.1).tangent, k);
  EXPECT_EQ(yield_deformation(spring.law), 0);
}

class BilinearSpring : public ::testing::TestWithParam<double> {};

// Hand calculation: f_y + r k (d - u_y) beyond yield; unloading by k over 2 u_y, then r k again.
TEST_P(BilinearSpring, FollowsTheSkeletonAndUnloadsWithTheElasticSlope) {
  const double r = GetParam();
  Walker<Bilinear> s = spring(r);
  EXPECT_NEAR(s.go(0.004).force, 8000, tiny);
  EXPECT_NEAR(s.peek(0.0049).tangent, k, k * 1e-14);
  EXPECT_NEAR(s.go(0.005).force, 10000, tiny);
  EXPECT_NEAR(s.peek(0.0051).tangent, r * k, k * 1e-14);
  EXPECT_NEAR(s.go(0.020).force, 10000 + r * k * 0.015, tiny);
  EXPECT_NEAR(s.peek(0.019).tangent, k, k * 1e-14);
  EXPECT_NEAR(s.go(0.012).force, 10000 + r * k * 0.015 - 16000, tiny);  // 8 mm of the 10 mm elastic range
  EXPECT_NEAR(s.go(0.010).force, 10000 + r * k * 0.015 - 20000, tiny);
  EXPECT_NEAR(s.peek(0.0099).tangent, r * k, k * 1e-14);
  EXPECT_NEAR(s.go(-0.020).force, -10000 - r * k * 0.015, tiny);  // on the opposite skeleton
  EXPECT_NEAR(s.go(-0.010).force, 10000 - r * k * 0.015, tiny);   // and back to its upper edge
}

TEST_P(BilinearSpring, SameForceInOneStrideAndInMany) {
  Walker<Bilinear> one = spring(GetParam()), many = spring(GetParam());
  for (const double turn : {0.02, -0.03, 0.004}) {
    const double from = many.deformation;
    one.go(turn);
    for (int i = 1; i <= 137; ++i) many.go(from + (turn - from) * i / 137);
    EXPECT_NEAR(one.force, many.force, 137 * tiny);
  }
}

// PUBLISHED P: energy per cycle 4 f_y u_y (1 - r)(mu - 1); equivalent damping 2 (mu-1)(1-r) / (pi mu (1 + r mu - r)),
// which is the loop over 4 pi times half the secant stiffness times the amplitude squared (Chopra, ch. 7; from memory).
TEST_P(BilinearSpring, LoopHasThePublishedAreaAndDamping) {
  const double r = GetParam();
  for (const double mu : {1.5, 2.0, 4.0, 8.0}) {
    const double d = mu * u_y;
    // Turns at the corners of the loop make the trapezoid rule exact.
    Walker<Bilinear> s = spring(r);
    s.go(d);
    double work = 0, dissipated = 0;
    for (const double to : {d - 2 * u_y, -d, -d + 2 * u_y, d}) {
      const Walker<Bilinear> before = s;
      s.go(to);
      work += 0.5 * (before.force + s.force) * (to - before.deformation);
      dissipated += dissipated_energy<double>(s.law, before.memory, s.memory);
    }
    const double published = 4 * f_y * u_y * (1 - r) * (mu - 1);
    EXPECT_NEAR(work, published, 1e-12 * published);
    EXPECT_NEAR(dissipated, published, 1e-12 * published);
    const double equivalent = work / (4 * std::numbers::pi * 0.5 * s.force * d);
    const double printed = 2 * (mu - 1) * (1 - r) / (std::numbers::pi * mu * (1 + r * mu - r));
    EXPECT_NEAR(equivalent, printed, 1e-11 * std::abs(printed));
  }
}

INSTANTIATE_TEST_SUITE_P(Ratios, BilinearSpring, ::testing::Values(0.0, 0.03, 0.5, -0.1));

TEST(BilinearSpring, YieldDeformationIsShearOverStiffness) {
  EXPECT_DOUBLE_EQ(yield_deformation(Bilinear{k, f_y, 0.1}), u_y);
  EXPECT_DOUBLE_EQ(initial_stiffness(Bilinear{k, f_y, 0.1}), k);
}

}  // namespace
}  // namespace pilotis
