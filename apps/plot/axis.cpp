#include "apps/plot/axis.hpp"

#include <fmt/format.h>

#include <array>
#include <cmath>
#include <limits>
#include <span>

namespace pilotis {

namespace {

constexpr double hair = 1e-9;  // of a tick's distance: what rounding may move

// The least of 1, 2, 5, 10 times a power of ten that is not below `least`.
double nice_step(double least) {
  const double power = std::pow(10.0, std::floor(std::log10(least)));
  for (const double factor : {1.0, 2.0, 5.0})
    if (factor * power >= least * (1 - hair)) return factor * power;
  return 10 * power;
}

std::vector<double> decade_ticks(double low, double high, std::span<const double> factors) {
  std::vector<double> ticks;
  const int first = static_cast<int>(std::floor(std::log10(low))), last = static_cast<int>(std::ceil(std::log10(high)));
  for (int power = first; power <= last; ++power)
    for (const double factor : factors) {
      const double tick = factor * std::pow(10.0, power);
      if (tick >= low * (1 - hair) && tick <= high * (1 + hair)) ticks.push_back(tick);
    }
  return ticks;
}

}  // namespace

double Axis::place_of(double value) const {
  if (!logarithmic) return (value - low) / (high - low);
  if (!(value > 0)) return -std::numeric_limits<double>::infinity();
  return std::log(value / low) / std::log(high / low);
}

Axis linear_axis(double low, double high, int most_ticks, AxisEnds ends) {
  if (!std::isfinite(low) || !std::isfinite(high)) low = high = 0;
  if (!(high > low)) {
    const double room = low == 0 ? 1 : std::abs(low);
    low -= room;
    high += room;
  }
  const double step = nice_step((high - low) / most_ticks);
  if (ends == AxisEnds::drawn_out) {
    const double half = step / 2;
    low = half * std::floor(low / half + hair);
    high = half * std::ceil(high / half - hair);
  }
  const long first = std::lround(std::ceil(low / step - hair)), last = std::lround(std::floor(high / step + hair));
  Axis axis{low, high, false, {}};
  for (long i = first; i <= last; ++i) axis.ticks.push_back(static_cast<double>(i) * step);
  return axis;
}

Axis logarithmic_axis(double low, double high, int most_ticks) {
  constexpr std::array<double, 3> all{1, 2, 5};
  Axis axis{low, high, true, decade_ticks(low, high, all)};
  if (axis.ticks.size() > static_cast<std::size_t>(most_ticks))
    axis.ticks = decade_ticks(low, high, std::span(all).first(1));
  return axis;
}

std::string tick_text(double tick) { return fmt::format("{:g}", tick); }

}  // namespace pilotis
