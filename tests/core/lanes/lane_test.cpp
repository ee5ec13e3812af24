// The lane scalar, lane by lane, against plain C++ on doubles.
#include "core/lanes/lane.hpp"

#include <gtest/gtest.h>

#include <cmath>

namespace pilotis {
namespace {

template <class R>
class Lanes : public ::testing::Test {};
// Wrapped, as an alias with a vector attribute is not kept by a template argument that only names it.
struct One {
  using R = double;
};
struct Two {
  using R = Pack<2>;
};
struct Four {
  using R = Pack<4>;
};
struct Eight {
  using R = Pack<8>;
};
using Widths = ::testing::Types<One, Two, Four, Eight>;
TYPED_TEST_SUITE(Lanes, Widths);

// Different in every lane, both signs and zero among them.
template <class R>
R ramp(double start) {
  R x{};
  for (int i = 0; i < LaneTraits<R>::width; ++i) set_lane(x, i, start + 0.5 * i);
  return x;
}

TYPED_TEST(Lanes, WidthIsTheNumberOfDoubles) {
  using R = typename TypeParam::R;
  EXPECT_EQ(sizeof(R), LaneTraits<R>::width * sizeof(double));
}

TYPED_TEST(Lanes, SplatFillsEveryLane) {
  using R = typename TypeParam::R;
  const R x = splat<R>(-2.25);
  for (int i = 0; i < LaneTraits<R>::width; ++i) EXPECT_EQ(lane(x, i), -2.25);
}

TYPED_TEST(Lanes, AbsSignMinMaxLaneByLane) {
  using R = typename TypeParam::R;
  const R x = ramp<R>(-1.0), y = ramp<R>(0.25) * -1.0;
  const R size = lane_abs<R>(x), sign = lane_sign<R>(x), low = lane_min<R>(x, y), high = lane_max<R>(x, y);
  for (int i = 0; i < LaneTraits<R>::width; ++i) {
    const double a = lane(x, i), b = lane(y, i);
    EXPECT_EQ(lane(size, i), std::abs(a));
    EXPECT_EQ(lane(sign, i), a > 0 ? 1 : a < 0 ? -1 : 0);
    EXPECT_EQ(lane(low, i), std::min(a, b));
    EXPECT_EQ(lane(high, i), std::max(a, b));
  }
}

TYPED_TEST(Lanes, SignOfZeroIsZero) {
  using R = typename TypeParam::R;
  EXPECT_EQ(lane(lane_sign<R>(splat<R>(0)), 0), 0);
  EXPECT_EQ(lane(lane_sign<R>(splat<R>(-0.0)), 0), 0);
}

TYPED_TEST(Lanes, SelectTakesEachLaneFromItsSide) {
  using R = typename TypeParam::R;
  const R x = ramp<R>(-1.0), yes = ramp<R>(10), no = ramp<R>(-20);
  const auto negative = x < 0.0;
  const R chosen = select(negative, yes, no);
  for (int i = 0; i < LaneTraits<R>::width; ++i)
    EXPECT_EQ(lane(chosen, i), lane(x, i) < 0 ? lane(yes, i) : lane(no, i));
}

// One lane alone decides any(), one lane alone spoils all().
TYPED_TEST(Lanes, AnyAndAllSeeEveryLane) {
  using R = typename TypeParam::R;
  EXPECT_FALSE(any(splat<R>(1) < 0.0));
  EXPECT_TRUE(all(splat<R>(1) > 0.0));
  for (int i = 0; i < LaneTraits<R>::width; ++i) {
    R x = splat<R>(1);
    set_lane(x, i, -1);
    EXPECT_TRUE(any(x < 0.0)) << i;
    EXPECT_FALSE(all(x > 0.0)) << i;
    EXPECT_EQ(all(x < 0.0), LaneTraits<R>::width == 1);
    EXPECT_EQ(any(x > 0.0), LaneTraits<R>::width > 1);
  }
}

TYPED_TEST(Lanes, PowersAreThoseOfTheStandardLibrary) {
  using R = typename TypeParam::R;
  const R x = ramp<R>(0.0);
  for (const double n : {1.0, 2.0, 3.0, 0.5, 7.25}) {
    const R y = lane_power<R>(x, n);
    // x * x is correctly rounded, and so is what std::pow gives within one unit of the last place.
    for (int i = 0; i < LaneTraits<R>::width; ++i) EXPECT_DOUBLE_EQ(lane(y, i), std::pow(lane(x, i), n)) << n;
  }
}

}  // namespace
}  // namespace pilotis
