// An axis of a picture: where a value stands on it, and where its ticks are.
#pragma once

#include <string>
#include <vector>

namespace pilotis {

struct Axis {
  double low = 0, high = 1;  // low < high; both > 0 on a logarithmic axis
  bool logarithmic = false;
  std::vector<double> ticks;  // rising, within low and high

  // 0 at low, 1 at high; beyond them less or more. -infinity for what a logarithmic axis has no place for.
  double place_of(double value) const;
};

enum class AxisEnds {
  exact,     // the axis ends where the values do
  drawn_out  // and is drawn out to the next tick or to half the way there
};

// Ticks at 1, 2 or 5 times a power of ten, about `most_ticks` at most (Heckbert, "Nice numbers for graph labels",
// Graphics Gems, 1990; from memory). Equal or non-finite values get an axis around them that can be drawn.
Axis linear_axis(double low, double high, int most_ticks, AxisEnds ends);

// 0 < low < high. Ticks at 1, 2 and 5 times the powers of ten, or at the powers only where that is too many.
Axis logarithmic_axis(double low, double high, int most_ticks);

// A tick as text: "0.3", "1e-05".
std::string tick_text(double tick);

}  // namespace pilotis
