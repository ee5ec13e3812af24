// One picture as data: lines over two axes. screen.hpp draws it with characters, svg.hpp as SVG.
#pragma once

#include <string>
#include <vector>

#include "apps/plot/axis.hpp"

namespace pilotis {

// How a line stands among the others.
enum class LineWeight { normal, faint, strong, dashed };

struct ChartLine {
  std::string name;          // for the legend; empty: not in it
  std::vector<double> x, y;  // as many; x rising. Gaps where one is not finite
  LineWeight weight = LineWeight::normal;
};

struct Chart {
  std::string title;
  std::string note;              // beside the title, e.g. the peak
  std::string x_title, y_title;  // with their units, e.g. "period (s)"
  bool logarithmic_x = false;    // what is not above 0 is left out
  bool logarithmic_y = false;
  bool tall = false;  // a spectrum rather than a history
  std::vector<ChartLine> lines;
};

// The axes that hold all lines. x ends where the values do; y is drawn out (axis.hpp), and holds 0 where it is linear.
struct ChartAxes {
  Axis x, y;
};
ChartAxes axes_of(const Chart& chart, int most_x_ticks, int most_y_ticks);

// The line in at most four points a column: first, lowest, highest and last of each, so that no peak is lost.
ChartLine thinned(const ChartLine& line, const Axis& x, int columns);

}  // namespace pilotis
