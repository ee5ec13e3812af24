#include "apps/plot/chart.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

namespace pilotis {

namespace {

struct Range {
  double low = std::numeric_limits<double>::infinity(), high = -low;
  void hold(double value, bool only_positive) {
    if (!std::isfinite(value) || (only_positive && value <= 0)) return;
    low = std::min(low, value);
    high = std::max(high, value);
  }
};

Axis axis_of(Range range, bool logarithmic, int most_ticks, AxisEnds ends) {
  if (!logarithmic) return linear_axis(range.low, range.high, most_ticks, ends);
  if (!(range.low <= range.high)) return logarithmic_axis(0.1, 1, most_ticks);  // nothing to show
  if (range.low == range.high) return logarithmic_axis(range.low / 2, range.high * 2, most_ticks);
  return logarithmic_axis(range.low, range.high, most_ticks);
}

int column_of(double x, const Axis& axis, int columns) {
  const double place = axis.place_of(x);
  if (!(place > 0)) return 0;
  return std::min(columns - 1, static_cast<int>(place * columns));
}

// The points from `begin` to `end` that a column keeps, in their order.
void add_extremes(const ChartLine& line, std::size_t begin, std::size_t end, ChartLine& thin) {
  std::size_t lowest = begin, highest = begin;
  for (std::size_t i = begin; i < end; ++i) {
    if (line.y[i] < line.y[lowest]) lowest = i;
    if (line.y[i] > line.y[highest]) highest = i;
  }
  std::array<std::size_t, 4> keep{begin, lowest, highest, end - 1};
  std::sort(keep.begin(), keep.end());
  for (std::size_t k = 0; k < keep.size(); ++k) {
    if (k > 0 && keep[k] == keep[k - 1]) continue;
    thin.x.push_back(line.x[keep[k]]);
    thin.y.push_back(line.y[keep[k]]);
  }
}

}  // namespace

ChartAxes axes_of(const Chart& chart, int most_x_ticks, int most_y_ticks) {
  Range x, y;
  if (!chart.logarithmic_y) y.hold(0, false);
  for (const ChartLine& line : chart.lines) {
    for (const double value : line.x) x.hold(value, chart.logarithmic_x);
    for (const double value : line.y) y.hold(value, chart.logarithmic_y);
  }
  return {axis_of(x, chart.logarithmic_x, most_x_ticks, AxisEnds::exact),
          axis_of(y, chart.logarithmic_y, most_y_ticks, AxisEnds::drawn_out)};
}

ChartLine thinned(const ChartLine& line, const Axis& x, int columns) {
  ChartLine thin{line.name, {}, {}, line.weight};
  for (std::size_t begin = 0; begin < line.x.size();) {
    const int column = column_of(line.x[begin], x, columns);
    std::size_t end = begin + 1;
    while (end < line.x.size() && column_of(line.x[end], x, columns) == column) ++end;
    add_extremes(line, begin, end, thin);
    begin = end;
  }
  return thin;
}

}  // namespace pilotis
