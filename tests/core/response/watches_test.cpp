// Peaks, residuals, histories and collapse on prepared values; the expected results are by hand.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "core/response/collapse.hpp"
#include "core/response/histories.hpp"
#include "core/response/peaks.hpp"
#include "core/response/residual.hpp"
#include "tests/core/response/shown.hpp"

namespace pilotis {
namespace {

using namespace test;
using std::numbers::pi;

TEST(Layout, EveryQuantityHasItsOwnPlace) {
  const ResponseLayout layout(4);
  std::vector<int> taken(layout.size(), 0);
  for (const Quantity& quantity : quantities()) {
    EXPECT_EQ(layout.count(quantity), quantity.per == Per::run ? 1u : 4u);
    for (std::size_t i = 0; i < layout.count(quantity); ++i) ++taken.at(layout.offset(quantity) + i);
  }
  for (const int times : taken) EXPECT_EQ(times, 1);
  EXPECT_EQ(find_quantity("interstory_drift"), nullptr);
}

Peak peak_of(const PeakWatch& watch, const Screen& screen, std::string_view name, int place) {
  return watch.peaks()[screen.layout.offset(*find_quantity(name)) + place - 1];
}

TEST(PeakWatch, KeepsTheLargestMagnitudeWithItsSignAndTime) {
  Screen screen(2);
  PeakWatch watch(screen.layout);
  const double drifts[] = {0, 0.3, -0.7, 0.6, -0.7, 0.1};
  for (int i = 0; i < 6; ++i) {
    screen.set("drift", 2, drifts[i]);
    screen.set("base_shear", 1, 10 * i);
    EXPECT_TRUE(screen.show(watch, 0.5 * i, i % 2 == 0));  // states inside a step count as well
  }
  EXPECT_EQ(peak_of(watch, screen, "drift", 2).value, -0.7);
  EXPECT_EQ(peak_of(watch, screen, "drift", 2).time, 1.0);  // the first of two equal ones
  EXPECT_EQ(peak_of(watch, screen, "base_shear", 1).value, 50);
  EXPECT_EQ(peak_of(watch, screen, "base_shear", 1).time, 2.5);
  EXPECT_EQ(peak_of(watch, screen, "drift", 1).value, 0);
}

// Offset plus sine over one whole period: the mean is the offset and half the range the amplitude. Over a whole period
// the trapezoid rule on equal steps is exact for a sine; the peak of 200 samples is low by at most (pi/200)^2/2.
TEST(ResidualWatch, MeanOfAnOffsetPlusASineIsTheOffset) {
  Screen screen(2);
  const double period = 0.8, from = 2.0, offset = -0.013, amplitude = 0.05;
  ResidualWatch watch(screen.layout, from);
  for (int i = 0; i <= 700; ++i) {
    const double t = i * period / 200;
    screen.set("drift", 1, offset + amplitude * std::sin(2 * pi * t / period + 0.3));
    screen.set("drift", 2, t < from ? 5.0 : 0.25);  // before the window nothing counts
    screen.show(watch, t);
  }
  EXPECT_NEAR(watch.drift()[0], offset, 1e-14);
  EXPECT_NEAR(watch.swing()[0], amplitude, amplitude * (pi / 200) * (pi / 200) / 2);
  EXPECT_NEAR(watch.drift()[1], 0.25, 1e-14);
  EXPECT_EQ(watch.swing()[1], 0);
}

// 2 over [1, 2], then a ramp from 2 to 6 over [2, 4]: (2 + 8) / 3.
TEST(ResidualWatch, WeighsByTimeNotByCount) {
  Screen screen(1);
  ResidualWatch watch(screen.layout, 1.0);
  const double times[] = {0, 1, 1.1, 1.2, 1.3, 2, 4}, drifts[] = {9, 2, 2, 2, 2, 2, 6};
  for (int i = 0; i < 7; ++i) {
    screen.set("drift", 1, drifts[i]);
    screen.show(watch, times[i]);
  }
  EXPECT_NEAR(watch.drift()[0], 10.0 / 3, 1e-14);
  EXPECT_EQ(watch.swing()[0], 2);
}

TEST(ResidualWatch, TakesTheLastValueWhenTheWindowWasNotReached) {
  Screen screen(1);
  ResidualWatch watch(screen.layout, 10.0);
  for (const double drift : {0.1, 0.2}) {
    screen.set("drift", 1, drift);
    screen.show(watch, drift);
  }
  EXPECT_EQ(watch.drift()[0], 0.2);
  EXPECT_EQ(watch.swing()[0], 0);
}

TEST(HistoryKeeper, KeepsEveryNthWholeStepOfWhatWasAsked) {
  Screen screen(2);
  const std::vector<const Quantity*> kept{find_quantity("drift"), find_quantity("base_shear")};
  HistoryKeeper keeper(screen.layout, kept, 3, 7);
  for (int i = 0; i <= 7; ++i) {
    screen.state.clock[0].step = i;
    screen.set("drift", 1, i);
    screen.set("drift", 2, -i);
    screen.set("base_shear", 1, 100 + i);
    screen.show(keeper, 0.1 * i);
    screen.set("drift", 1, 99);  // inside the step: not kept
    screen.show(keeper, 0.1 * i + 0.05, false);
  }
  ASSERT_EQ(keeper.times().size(), 3u);
  for (int k = 0; k < 3; ++k) EXPECT_DOUBLE_EQ(keeper.times()[k], 0.3 * k);
  ASSERT_EQ(keeper.histories().size(), 2u);
  EXPECT_EQ(keeper.histories()[0].quantity->name, "drift");
  EXPECT_EQ(keeper.histories()[0].values, (std::vector<double>{0, 0, 3, -3, 6, -6}));
  EXPECT_EQ(keeper.histories()[1].values, (std::vector<double>{100, 103, 106}));
}

TEST(HistoryKeeper, KeepsNothingWhenNothingWasAsked) {
  Screen screen(2);
  HistoryKeeper keeper(screen.layout, {}, 1, 10);
  screen.show(keeper, 0);
  EXPECT_TRUE(keeper.times().empty());
  EXPECT_TRUE(keeper.histories().empty());
}

TEST(CollapseWatch, StopsWhenAStoryPassesTheRatioToEitherSide) {
  for (const double sign : {1.0, -1.0}) {
    Screen screen(3);
    CollapseWatch watch(screen.layout, 0.1);
    screen.set("drift_ratio", 2, sign * 0.1);
    screen.set("drift", 3, sign * 5);  // a drift, not a ratio
    EXPECT_TRUE(screen.show(watch, 0));
    EXPECT_EQ(watch.story(), 0);
    screen.set("drift_ratio", 2, sign * 0.1001);
    EXPECT_FALSE(screen.show(watch, 1));
    EXPECT_EQ(watch.story(), 2);
  }
}

}  // namespace
}  // namespace pilotis
