#include "core/motion/measures/intensity.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "core/motion/processing/histories.hpp"
#include "core/units/units.hpp"

namespace pilotis {

namespace {

double largest_magnitude(const std::vector<double>& values) {
  double largest = 0;
  for (const double value : values) largest = std::max(largest, std::abs(value));
  return largest;
}

// Integral of a^2 up to each time of the history; a linear in each step: (a0^2 + a0 a1 + a1^2) step / 3.
std::vector<double> growing_square(const Accelerogram& record) {
  const std::vector<double> a = acceleration_history(record);
  std::vector<double> sum(a.size(), 0.0);
  for (std::size_t i = 1; i < a.size(); ++i)
    sum[i] = sum[i - 1] + record.step * (a[i - 1] * a[i - 1] + a[i - 1] * a[i] + a[i] * a[i]) / 3;
  return sum;
}

// Of |a| over one step; where a changes sign, two triangles.
double absolute_area(double a, double b, double step) {
  const double size = std::abs(a) + std::abs(b);
  return a * b >= 0 ? step * size / 2 : step * (a * a + b * b) / (2 * size);
}

// Time at which `sum`, not falling, reaches `level`, between 0 and its last value.
double time_of(const std::vector<double>& sum, double level, double step) {
  const auto above = std::lower_bound(sum.begin(), sum.end(), level);
  if (above == sum.begin()) return 0;
  if (above == sum.end()) return step * static_cast<double>(sum.size() - 1);
  const double before = *(above - 1);
  return step * (static_cast<double>(above - sum.begin()) - 1 + (level - before) / (*above - before));
}

}  // namespace

double peak_ground_acceleration(const Accelerogram& record) { return largest_magnitude(record.samples); }
double peak_ground_velocity(const Accelerogram& record) { return largest_magnitude(velocity_history(record)); }
double peak_ground_displacement(const Accelerogram& record) { return largest_magnitude(displacement_history(record)); }

double velocity_acceleration_ratio(const Accelerogram& record) {
  const double pga = peak_ground_acceleration(record);
  return pga > 0 ? peak_ground_velocity(record) / pga : 0;
}

double arias_intensity(const Accelerogram& record) {
  return std::numbers::pi / (2 * standard_gravity) * growing_square(record).back();
}

double cumulative_absolute_velocity(const Accelerogram& record) {
  const std::vector<double> a = acceleration_history(record);
  double sum = 0;
  for (std::size_t i = 1; i < a.size(); ++i) sum += absolute_area(a[i - 1], a[i], record.step);
  return sum;
}

TimeWindow arias_window(const Accelerogram& record, double from, double to) {
  const std::vector<double> sum = growing_square(record);
  if (sum.back() == 0) return {};
  return {time_of(sum, from * sum.back(), record.step), time_of(sum, to * sum.back(), record.step)};
}

double significant_duration(const Accelerogram& record, double from, double to) {
  const TimeWindow window = arias_window(record, from, to);
  return window.end - window.begin;
}
double significant_duration_5_75(const Accelerogram& record) { return significant_duration(record, 0.05, 0.75); }
double significant_duration_5_95(const Accelerogram& record) { return significant_duration(record, 0.05, 0.95); }

double bracketed_duration(const Accelerogram& record, double threshold) {
  const auto reaches = [threshold](double a) { return std::abs(a) >= threshold; };
  const auto& samples = record.samples;
  const auto first = std::find_if(samples.begin(), samples.end(), reaches);
  if (first == samples.end()) return 0;
  const auto last = std::find_if(samples.rbegin(), samples.rend(), reaches).base() - 1;
  return record.step * static_cast<double>(last - first);
}
double bracketed_duration_005g(const Accelerogram& record) {
  return bracketed_duration(record, 0.05 * standard_gravity);
}

double rms_acceleration(const Accelerogram& record) {
  const std::vector<double> sum = growing_square(record);
  return std::sqrt(sum.back() / (record.step * static_cast<double>(sum.size() - 1)));
}

}  // namespace pilotis
