// Axes, thinning and the canvas of dots. Ticks by the rule of Heckbert 1990 (from memory), worked by hand; Braille
// patterns by The Unicode Standard, block 2800 to 28FF.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "apps/plot/canvas.hpp"
#include "apps/plot/screen.hpp"
#include "apps/plot/svg.hpp"

namespace pilotis {
namespace {

void expect_ticks(const Axis& axis, const std::vector<double>& ticks) {
  ASSERT_EQ(axis.ticks.size(), ticks.size());
  for (std::size_t i = 0; i < ticks.size(); ++i) EXPECT_NEAR(axis.ticks[i], ticks[i], 1e-12);
}

TEST(Axis, TicksAreNiceNumbers) {
  expect_ticks(linear_axis(0, 20, 10, AxisEnds::exact), {0, 2, 4, 6, 8, 10, 12, 14, 16, 18, 20});
  expect_ticks(linear_axis(-0.42, 0.31, 4, AxisEnds::exact), {-0.4, -0.2, 0, 0.2});
  expect_ticks(logarithmic_axis(0.01, 1, 10), {0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1});
  expect_ticks(logarithmic_axis(0.01, 1, 4), {0.01, 0.1, 1});
}

TEST(Axis, IsDrawnOutToHalfATick) {
  const Axis axis = linear_axis(-0.52, 0.31, 2, AxisEnds::drawn_out);
  EXPECT_DOUBLE_EQ(axis.low, -0.75);
  EXPECT_DOUBLE_EQ(axis.high, 0.5);
  expect_ticks(axis, {-0.5, 0, 0.5});
}

TEST(Axis, EqualAndBrokenValuesCanBeDrawn) {
  for (const double value : {0.0, 3.0, -3.0, static_cast<double>(NAN)}) {
    const Axis axis = linear_axis(value, value, 5, AxisEnds::drawn_out);
    EXPECT_LT(axis.low, axis.high);
    EXPECT_FALSE(axis.ticks.empty());
  }
}

TEST(Axis, PlacesAreShares) {
  EXPECT_DOUBLE_EQ(linear_axis(2, 4, 5, AxisEnds::exact).place_of(2.5), 0.25);
  EXPECT_NEAR(logarithmic_axis(0.01, 1, 9).place_of(0.1), 0.5, 1e-15);
  EXPECT_TRUE(std::isinf(logarithmic_axis(0.01, 1, 9).place_of(0)));
}

TEST(Thinning, KeepsEveryColumnsExtremes) {
  ChartLine line;
  for (int i = 0; i < 10000; ++i) {
    line.x.push_back(i);
    line.y.push_back(i == 1234 ? 9 : i == 7777 ? -8 : std::sin(i));
  }
  const ChartLine thin = thinned(line, linear_axis(0, 9999, 5, AxisEnds::exact), 100);
  EXPECT_LE(thin.x.size(), 400u);
  EXPECT_NE(std::find(thin.x.begin(), thin.x.end(), 1234), thin.x.end());
  EXPECT_NE(std::find(thin.x.begin(), thin.x.end(), 7777), thin.x.end());
  EXPECT_TRUE(std::is_sorted(thin.x.begin(), thin.x.end()));
}

TEST(Canvas, DotsAreBrailleOrAscii) {
  Canvas braille(2, 1, true);
  EXPECT_EQ(braille.dots_across(), 4);
  EXPECT_EQ(braille.dots_down(), 4);
  braille.draw_line(0, 0, 0, 3, 0);  // dots 1, 2, 3 and 7: U+2847
  braille.draw_line(3, 3, 3, 3, 0);  // dot 8: U+2880
  EXPECT_EQ(braille.row_text(0, {""}), "\u2847\u2880");
  Canvas ascii(4, 1, false);
  ascii.draw_line(0, 0, 0, 0, 0);
  ascii.draw_line(1, 1, 1, 1, 0);
  ascii.draw_line(2, 0, 2, 1, 0);
  ascii.draw_line(-5, 0, -5, 1, 0);  // outside
  EXPECT_EQ(ascii.row_text(0, {""}), "'.: ");
}

TEST(Charts, NothingToShowCanBeDrawn) {
  for (const bool logarithmic : {false, true}) {
    Chart chart{"empty", "", "period (s)", "acceleration (g)", logarithmic, logarithmic, true, {}};
    EXPECT_FALSE(chart_text(chart, 7, ScreenStyle{}).empty());
    chart.lines.push_back({"", {0, 0}, {NAN, NAN}});
    EXPECT_FALSE(chart_text(chart, 7, ScreenStyle{}).empty());
    EXPECT_EQ(svg_of("empty", {{chart}}).find("nan"), std::string::npos);
  }
}

TEST(Svg, TextIsEscaped) { EXPECT_EQ(xml_text("a<b> & \"c\"\x01"), "a&lt;b&gt; &amp; &quot;c&quot; "); }

}  // namespace
}  // namespace pilotis
