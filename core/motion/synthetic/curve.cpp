#include "core/motion/synthetic/curve.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

void require_positive(double value, std::string_view name, Dimension dimension, std::size_t row,
                      const std::string& where) {
  if (std::isfinite(value) && value > 0) return;
  throw input_error(where, fmt::format("row {}: found {} {} {}", row, name, value, si_unit(dimension)),
                    fmt::format("it must be finite and greater than 0 {}", si_unit(dimension)));
}

}  // namespace

void require_allowed(const CurveParameter& parameter, const Curve& curve, const std::string& where) {
  if (curve.x.empty() && curve.y.empty() && !parameter.required) return;
  if (curve.x.size() < 2 || curve.y.size() != curve.x.size())
    throw input_error(where, fmt::format("found {} rows", std::min(curve.x.size(), curve.y.size())),
                      fmt::format("{}: at least two rows of {} and {} are needed", parameter.meaning, parameter.x_name,
                                  parameter.y_name));
  for (std::size_t i = 0; i < curve.x.size(); ++i) {
    require_positive(curve.x[i], parameter.x_name, parameter.x, i + 1, where);
    require_positive(curve.y[i], parameter.y_name, parameter.y, i + 1, where);
    if (i > 0 && curve.x[i] <= curve.x[i - 1])
      throw input_error(
          where, fmt::format("row {}: found {} {} after {}", i + 1, parameter.x_name, curve.x[i], curve.x[i - 1]),
          fmt::format("the {} must rise from row to row", parameter.x_name));
  }
}

double log_log(const Curve& curve, double x) {
  if (x <= curve.x.front()) return curve.y.front();
  if (x >= curve.x.back()) return curve.y.back();
  const auto i = static_cast<std::size_t>(std::upper_bound(curve.x.begin(), curve.x.end(), x) - curve.x.begin());
  const double share = std::log(x / curve.x[i - 1]) / std::log(curve.x[i] / curve.x[i - 1]);
  return curve.y[i - 1] * std::pow(curve.y[i] / curve.y[i - 1], share);
}

}  // namespace pilotis
