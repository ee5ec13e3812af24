#include "core/motion/target/table.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

void require_row(const TargetTable& table, std::size_t i, const std::string& where) {
  const double period = table.periods[i], acceleration = table.accelerations[i];
  const bool log = table.between == Between::log_log;
  if (!std::isfinite(period) || period < 0 || (log && period == 0))
    throw input_error(where, fmt::format("row {} has the period {:g} s", i + 1, period),
                      log ? "it must be greater than 0 s to interpolate in logarithms" : "it must be at least 0 s");
  if (i > 0 && period <= table.periods[i - 1])
    throw input_error(where,
                      fmt::format("row {} has the period {:g} s after {:g} s", i + 1, period, table.periods[i - 1]),
                      "periods must rise");
  if (!std::isfinite(acceleration) || acceleration <= 0)
    throw input_error(where, fmt::format("row {} has the acceleration {:g} m/s2", i + 1, acceleration),
                      "it must be greater than 0 m/s2");
}

void require_table(const TargetTable& table, const std::string& where) {
  if (table.periods.size() < 2 || table.periods.size() != table.accelerations.size())
    throw input_error(
        where, fmt::format("found {} periods and {} accelerations", table.periods.size(), table.accelerations.size()),
        "at least two rows of both are needed");
  for (std::size_t i = 0; i < table.periods.size(); ++i) require_row(table, i, where);
  if (!(table.damping >= 0 && table.damping <= 1))
    throw input_error(where, fmt::format("found a damping ratio of {:g}", table.damping), "it must be 0 to 1");
  if (table.source.empty()) throw input_error(where, "the table has no source", "say where it comes from");
}

double interpolated(const TargetTable& table, double period) {
  const auto& x = table.periods;
  const auto& y = table.accelerations;
  const auto above = std::lower_bound(x.begin(), x.end(), period);
  const auto i = static_cast<std::size_t>(above - x.begin());
  if (x[i] == period) return y[i];
  if (table.between == Between::linear) return std::lerp(y[i - 1], y[i], (period - x[i - 1]) / (x[i] - x[i - 1]));
  return y[i - 1] * std::pow(y[i] / y[i - 1], std::log(period / x[i - 1]) / std::log(x[i] / x[i - 1]));
}

}  // namespace

TargetSpectrum target_from(const TargetTable& table, const std::string& where) {
  require_table(table, where);
  return {fmt::format("table of {} periods from {:g} to {:g} s, {} between them, damping {:g} %; {}",
                      table.periods.size(), table.periods.front(), table.periods.back(),
                      table.between == Between::log_log ? "log-log" : "linear", 100 * table.damping, table.source),
          table.damping, table.periods.front(), table.periods.back(),
          [table](double period) { return interpolated(table, period); }};
}

}  // namespace pilotis
