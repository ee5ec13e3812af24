// Bouc-Wen against the closed forms of its equation dz/dx = A - |z|^n (gamma + beta sign(dx) sign(z)), x = d / u_y:
// separable for n = 1 and n = 2 on one branch (integration by hand; the ultimate value also in Wen 1976, from memory).
#include <gtest/gtest.h>

#include "tests/core/laws/legal_law.hpp"

namespace pilotis {
namespace {

using namespace test;

constexpr double k = 2e6, f_y = 1e4, u_y = 0.005;

struct Shape {
  double n, beta, gamma, A;
};

Walker<BoucWen> spring(const Shape& s, double r = 0) {
  const std::vector<double> values{k, f_y, r, s.n, s.beta, s.gamma, s.A};
  return {BoucWen::make(values)};
}

// Classical Runge-Kutta over one stride of h = 1/4 of the rate misses h^5/120 of z'; strides further back are forgotten
// as fast as z closes in, so the sum stays below h^4/120 / e of the ultimate value for n = 1, and below twice that with
// the curvature of n = 2. The factor 4 is for the latter and for strides not aligned with the worst case.
constexpr double stride_error = 4 * 0.25 * 0.25 * 0.25 * 0.25 / 120 / 2.718;

const Shape first_order[] = {
    {1, 0.5, 0.5, 1}, {1, 0.9, 0.1, 1}, {1, 0.8, -0.3, 2}, {1, 100, 100, 1}, {1, 0.01, 0.01, 5}};
const Shape second_order[] = {{2, 0.5, 0.5, 1}, {2, 0.7, -0.2, 3}, {2, 100, 90, 0.5}, {2, 0.05, 0, 1}};

TEST(BoucWenSpring, LoadsAlongTheExponentialForN1) {
  for (const Shape& s : first_order) {
    const double ultimate = s.A / (s.beta + s.gamma);
    for (const double rate_x : {0.01, 0.1, 0.7, 2.0, 5.0, 40.0}) {
      const double x = rate_x / (s.beta + s.gamma);
      const double z = ultimate * (1 - std::exp(-rate_x));
      EXPECT_NEAR(spring(s).peek(x * u_y).force / f_y, z, stride_error * ultimate) << s.beta << " " << rate_x;
      EXPECT_NEAR(spring(s).peek(-x * u_y).force / f_y, -z, stride_error * ultimate);
    }
  }
}

TEST(BoucWenSpring, LoadsAlongTheHyperbolicTangentForN2) {
  for (const Shape& s : second_order) {
    const double ultimate = std::sqrt(s.A / (s.beta + s.gamma)), rate = std::sqrt(s.A * (s.beta + s.gamma));
    for (const double rate_x : {0.01, 0.1, 0.7, 2.0, 5.0, 40.0}) {
      const double z = ultimate * std::tanh(rate_x);
      EXPECT_NEAR(spring(s).peek(rate_x / rate * u_y).force / f_y, z, stride_error * ultimate)
          << s.beta << " " << rate_x;
    }
  }
}

// n = 1, unloading from z0 > 0: dz/dx = A + (beta - gamma) z, hence z = (z0 + c) exp(-(beta - gamma) x) - c with
// c = A / (beta - gamma) and x the way back, until z = 0; from there the loading branch of the other side.
TEST(BoucWenSpring, UnloadsAndReloadsOnTheOtherSideForN1) {
  const Shape s{1, 0.9, 0.1, 1};
  Walker<BoucWen> w = spring(s);
  w.go(0.9 * u_y);
  const double z0 = w.force / f_y, c = 1 / 0.8;
  const double to_zero = std::log((z0 + c) / c) / 0.8;
  for (const double share : {0.2, 0.6, 0.99}) {
    const double x = share * to_zero;
    EXPECT_NEAR(w.peek((0.9 - x) * u_y).force / f_y, (z0 + c) * std::exp(-0.8 * x) - c, stride_error);
  }
  for (const double x : {0.3, 1.0, 4.0}) {
    // One stride may straddle the kink of dz/dx at z = 0; it overshoots by less than (beta - gamma) z^2 / (2 A).
    EXPECT_NEAR(w.peek((0.9 - to_zero - x) * u_y).force / f_y, -(1 - std::exp(-x)), 2 * stride_error);
  }
}

// By hand: just after a reversal at z0 the slope is r k + (1 - r) k (A + (beta - gamma) z0^n).
TEST(BoucWenSpring, UnloadsWithTheSlopeOfTheEquation) {
  for (const Shape& s : {Shape{1, 0.5, 0.5, 1}, Shape{2, 0.6, 0.2, 1}, Shape{5, 0.5, 0.1, 1}}) {
    const double r = 0.05;
    Walker<BoucWen> w = spring(s, r);
    w.go(1.5 * u_y);
    const double z0 = (w.force - r * k * w.deformation) / ((1 - r) * f_y);
    const double slope = r * k + (1 - r) * k * (s.A + (s.beta - s.gamma) * std::pow(z0, s.n));
    // Within 1e-9 u_y the slope changes by a few 1e-9.
    EXPECT_NEAR(w.peek(w.deformation - 1e-9 * u_y).tangent, slope, 1e-7 * k);
  }
}

// Wen 1976: |z| tends to (A / (beta + gamma))^(1/n). Sharp knees and fast rates included: the equation is stiff there.
TEST(BoucWenSpring, TendsToItsUltimateValueOnBothSides) {
  for (const double n : {1.0, 1.5, 2.0, 5.0, 20.0})
    for (const Shape& s :
         {Shape{n, 0.5, 0.5, 1}, Shape{n, 2, -1, 3}, Shape{n, 100, 100, 1}, Shape{n, 0.01, 0.005, 50}}) {
      const double ultimate = std::pow(s.A / (s.beta + s.gamma), 1 / n);
      const double far = 100 * ultimate / s.A * u_y;  // many times the length of the rise
      Walker<BoucWen> w = spring(s);
      for (const double side : {1.0, -1.0, 1.0}) {
        const Reply<double> answer = w.go(side * far);
        EXPECT_NEAR(answer.force / f_y, side * ultimate, 1e-12 * ultimate) << n << " " << s.beta;
        EXPECT_NEAR(answer.tangent, 0, 1e-9 * s.A * k) << n << " " << s.beta;
      }
    }
}

// gamma = -beta: loading is a straight line of slope A without end (by hand: the bracket vanishes).
TEST(BoucWenSpring, LoadsStraightWhenGammaIsMinusBeta) {
  for (const double n : {1.0, 2.0, 3.5}) {
    Walker<BoucWen> w = spring({n, 0.5, -0.5, 1});
    EXPECT_NEAR(w.go(3 * u_y).force / f_y, 3, 1e-13);
    EXPECT_NEAR(w.peek(700 * u_y).force / f_y, 700, 1e-10);
    EXPECT_NEAR(w.peek(4 * u_y).tangent, k, 1e-10 * k);
  }
}

TEST(BoucWenSpring, RestsWhereItIsAfterOneLongStrideAsAfterManyShortOnes) {
  for (const Shape& s : {Shape{1, 0.5, 0.5, 1}, Shape{2, 0.5, 0.5, 1}, Shape{3, 0.8, 0.2, 1}}) {
    Walker<BoucWen> one = spring(s), many = spring(s);
    for (const double turn : {0.01, -0.02, 0.004}) {
      const double from = many.deformation;
      one.go(turn);
      for (int i = 1; i <= 200; ++i) many.go(from + (turn - from) * i / 200);
      // Two strides' errors, and for n = 3 more curvature than for n = 2.
      EXPECT_NEAR(one.force / f_y, many.force / f_y, 4 * stride_error) << s.n;
    }
  }
}

TEST(BoucWenSpring, InitialStiffness) {
  EXPECT_DOUBLE_EQ(initial_stiffness(spring({1, 0.5, 0.5, 1}, 0.1).law), k);
  EXPECT_DOUBLE_EQ(initial_stiffness(spring({1, 0.5, 0.5, 3}, 0.1).law), (0.1 + 0.9 * 3) * k);
  EXPECT_DOUBLE_EQ(yield_deformation(spring({1, 0.5, 0.5, 1}).law), u_y);
}

}  // namespace
}  // namespace pilotis
