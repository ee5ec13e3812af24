// Text set on the screen: widths in characters, clipping, padding, color, and numbers as a reader wants them.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "apps/terminal.hpp"
#include "io/study/study.hpp"

namespace pilotis {

// Characters of UTF-8 text, each taken as one column wide.
std::size_t columns_of(std::string_view text);

// At most `width` columns; what is cut off is marked by a last "…" (".." without unicode).
std::string clipped(const std::string& text, std::size_t width, const ScreenStyle& style);

// Lines of at most `width` columns, broken at blanks; a longer word stands alone on its line.
std::vector<std::string> wrapped(const std::string& text, std::size_t width);

std::string left(const std::string& text, std::size_t width);   // blanks after
std::string right(const std::string& text, std::size_t width);  // blanks before

enum class Tone { plain, strong, quiet, good, warning, bad };
// `text` in color, where the style has it.
std::string painted(const std::string& text, Tone tone, const ScreenStyle& style);

// "± " and friends, or their ASCII stand-ins.
struct Signs {
  explicit Signs(const ScreenStyle& style);
  std::string plus_minus, times, at_most, infinity, separator, bar, light_bar, mark, beyond;
  std::string half_bar, half_light, half_to_light;  // the left half of a cell; strong left and light right
};

// `decimals` places; "inf" sign for infinity, "-" for NaN.
std::string number_text(double value, int decimals, const Signs& signs);
// As number_text, but "<0.01" for what would round to nothing and "?" where the error was not estimated.
std::string error_text(double error, int decimals);
// Places after the point that show three figures of numbers up to `largest`, at most four.
int decimals_for(double largest);

// How a quantity is shown: its number is SI / factor, in `unit`. Ratios of drift in %, accelerations in g, the rest in
// the study's units; an empty unit for pure numbers.
struct ShownUnit {
  double factor = 1;
  std::string unit;
};
ShownUnit shown_unit(const Quantity& quantity, const StudyUnits& units);
// "drift ratio" for "drift_ratio".
std::string shown_name(const Quantity& quantity);
// "mean", "largest", "median", "84th-percentile".
std::string shown_statistic(const Limit& limit);

}  // namespace pilotis
