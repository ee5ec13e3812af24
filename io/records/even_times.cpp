#include "io/records/even_times.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>

#include "core/error.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

constexpr const char* allowed =
    "the first of two columns must be the time, rising evenly (state the step if its digits are only cut off); a "
    "single "
    "component stands in one column";

// How finely `time` is printed: to the last decimal, or, from the time on where all digits stand before that, to the
// last digit.
class Print {
 public:
  explicit Print(const Precision& finest)
      : finest_(finest),
        last_decimal_(std::pow(10.0, -finest.decimals)),
        by_digits_from_(finest.digits == 0 ? std::numeric_limits<double>::infinity()
                                           : std::pow(10.0, finest.digits - finest.decimals)) {}
  double last_digit(double time) const {
    if (std::abs(time) < by_digits_from_) return last_decimal_;
    return std::pow(10.0, std::floor(std::log10(std::abs(time))) + 1 - finest_.digits);
  }

 private:
  Precision finest_;
  double last_decimal_, by_digits_from_;
};

// How many last digits a printed time may differ from the even one, by where the step comes from.
constexpr double of_shown_step = 0.5 * (1 - 1e-6);
constexpr double of_stated_step = 0.5 * (1 + 1e-6);
constexpr double of_fitted_step = 1;

double tolerance(const Print& print, double time, double step, double digits) {
  const double printed = print.last_digit(time) * digits;
  return std::min(std::max(printed, 1e-6 * step), 0.45 * step);
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

// True when some start time goes with `step` and every printed time.
bool fits(const TimeColumn& column, double step, double digits) {
  const Print print(column.finest);
  double earliest = -std::numeric_limits<double>::infinity();
  double latest = std::numeric_limits<double>::infinity();
  for (std::size_t i = 0; i < column.times.size(); ++i) {
    const double time = column.times[i];
    const double start = time - step * static_cast<double>(i);
    const double slack = tolerance(print, time, step, digits);
    earliest = std::max(earliest, start - slack);
    latest = std::min(latest, start + slack);
  }
  return earliest <= latest;
}

// Slope of the straight line through the times, by least squares.
double best_step(const std::vector<double>& times) {
  const double middle = static_cast<double>(times.size() - 1) / 2;
  double above = 0, below = 0;
  for (std::size_t i = 0; i < times.size(); ++i) {
    const double from_middle = static_cast<double>(i) - middle;
    above += from_middle * (times[i] - times.front());
    below += from_middle * from_middle;
  }
  return above / below;
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
    if (differs > largest + 1e-9 * usual) worst = i, largest = differs;
  }
  const double before = column.times[worst - 1], now = column.times[worst];
  const double steps = (now - before) / usual;
  const std::string where = at_line(file, column.lines[worst]);
  const double slack = std::min(2 * tolerance(Print(column.finest), now, usual, of_stated_step) / usual, 0.25);
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

// True when the last times by the two steps would be printed alike, to one last digit.
bool alike_to_the_end(double step, double other, const TimeColumn& column) {
  const double most = Print(column.finest).last_digit(column.times.back());
  return std::abs(step - other) * static_cast<double>(column.times.size() - 1) <= most;
}

// The step that the times themselves show; empty when they are uneven.
std::optional<EvenTimes> shown_step(const TimeColumn& column) {
  const double best = best_step(column.times);
  const double printed = as_printed(best, column.finest.decimals);
  if (printed > 0 && fits(column, printed, of_shown_step)) return EvenTimes{printed, column.times.front(), false};
  const bool finely_printed = Print(column.finest).last_digit(column.times.back()) <= best / 10;
  if (!finely_printed || !fits(column, best, of_fitted_step)) return std::nullopt;
  const bool round = alike_to_the_end(best, printed, column) && fits(column, printed, of_fitted_step);
  return EvenTimes{round ? printed : best, column.times.front(), true};
}

// By the stated step where that fits.
std::optional<EvenTimes> found_times(const TimeColumn& column, std::optional<double> stated_step) {
  if (stated_step && fits(column, *stated_step, of_stated_step))
    return EvenTimes{*stated_step, column.times.front(), false};
  return shown_step(column);
}

}  // namespace

EvenTimes even_times(const TimeColumn& column, std::optional<double> stated_step, const std::string& file) {
  require_rising(column, file);
  const std::optional<EvenTimes> found = found_times(column, stated_step);
  if (!found) refuse_uneven(column, file);
  EvenTimes even = *found;
  if (stated_step && even.step != *stated_step)
    throw input_error(file,
                      fmt::format("the step is stated as {:.10g} {}, but the times of the file rise by {:.10g} {}",
                                  *stated_step, column.unit, even.step, column.unit),
                      "correct one of them");
  const Print print(column.finest);
  if (std::abs(even.first - even.step) <= tolerance(print, even.first, even.step, of_stated_step))
    even.first = even.step;
  return even;
}

std::optional<EvenTimes> even_times_if_even(const TimeColumn& column, std::optional<double> stated_step) {
  const std::optional<EvenTimes> found = found_times(column, stated_step);
  return found && stated_step && found->step != *stated_step ? std::nullopt : found;
}

}  // namespace pilotis
