// remove_mean, remove_trend: subtracts from the samples their mean, or the straight line that fits them best in the
// sense of least squares.
#pragma once

#include "core/motion/processing/step.hpp"

namespace pilotis {

struct RemoveMean {
  static const Method method;
  static RemoveMean make(std::span<const double> values);
  Processed applied(const Accelerogram& record) const;
};

struct RemoveTrend {
  static const Method method;
  static RemoveTrend make(std::span<const double> values);
  Processed applied(const Accelerogram& record) const;
};

}  // namespace pilotis
