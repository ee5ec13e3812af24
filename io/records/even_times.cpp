#include "io/records/even_times.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

constexpr const char* allowed =
    "the first of two columns must be the time, rising evenly; a single component stands in one column";

// How finely `time` is printed.
double last_digit(const Precision& finest, double time) {
  const double by_decimals = std::pow(10.0, -finest.decimals);
  if (time == 0 || finest.digits == 0) return by_decimals;
  const double by_digits = std::pow(10.0, std::floor(std::log10(std::abs(time))) + 1 - finest.digits);
  return std::max(by_decimals, by_digits);
}

double tolerance(const TimeColumn& column, double time, double step) {
  const double printed = last_digit(column.finest, time) * (1 + 1e-9);
  return std::min(std::max(printed, 1e-6 * step), 0.49 * step);
}

void require_rising(const TimeColumn& column, const std::string& file) {
  for (std::size_t i = 1; i < column.times.size(); ++i) {
    const double before = column.times[i - 1], now = column.times[i];
    if (now > before) continue;
    const std::string text = now == before
                                 ? fmt::format("the time {} is repeated (line {} has it too)", now, column.lines[i - 1])
                                 : fmt::format("the time goes backward: {} after {}", now, before);
    throw input_error(at_line(file, column.lines[i]), text, allowed);
  }
}

bool fits(const TimeColumn& column, double step) {
  const double first = column.times.front();
  for (std::size_t i = 0; i < column.times.size(); ++i) {
    const double time = column.times[i];
    const double even = first + step * static_cast<double>(i);
    if (std::abs(time - even) > tolerance(column, time, step)) return false;
  }
  return true;
}

double median_step(const std::vector<double>& times) {
  std::vector<double> steps;
  for (std::size_t i = 1; i < times.size(); ++i) steps.push_back(times[i] - times[i - 1]);
  const auto middle = steps.begin() + static_cast<std::ptrdiff_t>(steps.size() / 2);
  std::nth_element(steps.begin(), middle, steps.end());
  return *middle;
}

// Why the times are not even: a gap of whole steps, or the place that differs most from the usual step.
[[noreturn]] void refuse_uneven(const TimeColumn& column, const std::string& file) {
  const double usual = median_step(column.times);
  std::size_t worst = 1;
  double largest = -1;
  for (std::size_t i = 1; i < column.times.size(); ++i) {
    const double differs = std::abs(column.times[i] - column.times[i - 1] - usual);
    if (differs > largest) worst = i, largest = differs;
  }
  const double before = column.times[worst - 1], now = column.times[worst];
  const double steps = (now - before) / usual;
  const std::string where = at_line(file, column.lines[worst]);
  const double slack = 2 * tolerance(column, now, usual) / usual;
  if (steps > 1.5 && std::abs(steps - std::round(steps)) <= slack)
    throw input_error(where,
                      fmt::format("{:.0f} sample(s) missing between the times {} and {}: the first would be at {:.10g}",
                                  std::round(steps) - 1, before, now, before + usual),
                      "every sample must be there, evenly spaced");
  throw input_error(where,
                    fmt::format("uneven times: {} follows {}, a step of {:.6g} where {:.6g} is usual", now, before,
                                now - before, usual),
                    allowed);
}

// `value` rounded to the decimals of the column.
double as_printed(double value, int decimals) {
  const double scale = std::pow(10.0, decimals);
  return std::round(value * scale) / scale;
}

}  // namespace

EvenTimes even_times(const TimeColumn& column, const std::string& file) {
  require_rising(column, file);
  const auto intervals = static_cast<double>(column.times.size() - 1);
  const double mean = (column.times.back() - column.times.front()) / intervals;
  const double printed = as_printed(mean, column.finest.decimals);
  EvenTimes even;
  even.step = printed > 0 && fits(column, printed) ? printed : mean;
  if (!fits(column, even.step)) refuse_uneven(column, file);
  even.first = column.times.front();
  even.doubt = 2 * tolerance(column, column.times.back(), even.step) / intervals;
  if (std::abs(even.first - even.step) <= tolerance(column, even.first, even.step)) even.first = even.step;
  return even;
}

}  // namespace pilotis
