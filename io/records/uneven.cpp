#include "io/records/uneven.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

#include "core/error.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

constexpr std::array usual_steps{0.02, 0.01, 0.005, 0.002, 0.001};  // s
constexpr double most_samples_each = 100;

// Of pairs with the same time only the last stays. Gives how many went.
std::size_t drop_repeated(TimeColumn& column, std::vector<double>& values) {
  std::size_t kept = 0;
  for (std::size_t i = 0; i < column.times.size(); ++i) {
    if (kept > 0 && column.times[i] == column.times[kept - 1]) --kept;
    column.times[kept] = column.times[i];
    column.lines[kept] = column.lines[i];
    values[kept++] = values[i];
  }
  const std::size_t dropped = column.times.size() - kept;
  column.times.resize(kept);
  column.lines.resize(kept);
  values.resize(kept);
  return dropped;
}

void require_rising(const TimeColumn& column, const std::string& file) {
  for (std::size_t i = 1; i < column.times.size(); ++i)
    if (column.times[i] < column.times[i - 1])
      throw input_error(at_line(file, column.lines[i]),
                        fmt::format("the time goes backward: {} s after {} s", column.times[i], column.times[i - 1]),
                        "the times of the pairs must rise");
  if (column.times.size() < 2)
    throw input_error(file, "found fewer than two different times", "a record needs at least two samples");
}

double median_spacing(const std::vector<double>& times) {
  std::vector<double> spacings;
  for (std::size_t i = 1; i < times.size(); ++i) spacings.push_back(times[i] - times[i - 1]);
  const auto middle = spacings.begin() + static_cast<std::ptrdiff_t>(spacings.size() / 2);
  std::nth_element(spacings.begin(), middle, spacings.end());
  return *middle;
}

double usual_step(const std::vector<double>& times) {
  const double spacing = median_spacing(times) * (1 + 1e-9);
  for (double step : usual_steps)
    if (step <= spacing) return step;
  return usual_steps.back();
}

// Values on the straight lines between the pairs, from the first time to the last.
std::vector<double> interpolated(const std::vector<double>& times, const std::vector<double>& values, double step) {
  const auto count = static_cast<std::size_t>(std::floor((times.back() - times.front()) / step * (1 + 1e-12))) + 1;
  std::vector<double> even;
  even.reserve(count);
  for (std::size_t i = 0, right = 1; i < count; ++i) {
    const double time = times.front() + step * static_cast<double>(i);
    while (right + 1 < times.size() && times[right] < time) ++right;
    const double share = std::min((time - times[right - 1]) / (times[right] - times[right - 1]), 1.0);
    even.push_back(values[right - 1] + share * (values[right] - values[right - 1]));
  }
  return even;
}

double peak_in(const std::vector<double>& values) {
  double peak = 0;
  for (double value : values) peak = std::max(peak, std::abs(value));
  return peak;
}

void interpolate(const TimeColumn& column, const std::vector<double>& values, std::optional<double> stated_step,
                 EvenSamples& even, const std::string& file) {
  even.step = stated_step.value_or(usual_step(column.times));
  even.interpolated = true;
  const double most = most_samples_each * static_cast<double>(values.size());
  if (!((column.times.back() - column.times.front()) / even.step <= most))
    throw input_error(file,
                      fmt::format("the {} pairs reach from {} s to {} s, too far for a step of {} s", values.size(),
                                  column.times.front(), column.times.back(), even.step),
                      "are the times damaged?");
  even.values = interpolated(column.times, values, even.step);
  even.notes.push_back(fmt::format(
      "{} samples every {} s by straight lines between {} pairs of uneven times; the peak "
      "became {:.4g} times that of the pairs",
      even.values.size(), even.step, values.size(), peak_in(even.values) / std::max(peak_in(values), 1e-300)));
}

}  // namespace

EvenSamples even_samples(TimeColumn column, std::vector<double> values, std::optional<double> stated_step,
                         const std::string& file) {
  EvenSamples even;
  const std::size_t dropped = drop_repeated(column, values);
  require_rising(column, file);
  if (dropped > 0) even.notes.push_back(fmt::format("{} pair(s) left out whose time is repeated by the next", dropped));
  const std::optional<EvenTimes> shown = dropped > 0 ? std::nullopt : even_times_if_even(column, stated_step);
  if (shown) {
    even.step = shown->step;
    even.values = std::move(values);
    if (shown->finer_than_printed)
      even.notes.push_back(fmt::format("the times are rounded: a step of {:.10g} s fits them best", shown->step));
  } else {
    interpolate(column, values, stated_step, even, file);
  }
  if (column.times.front() != 0)
    even.notes.push_back(fmt::format("the times start at {} s: shifted to start at 0 s", column.times.front()));
  return even;
}

}  // namespace pilotis
