// scale: multiplies the record by a factor, stated itself or as the value that one of the measures is to have.
//
// The keys are `factor` and the name of every measure of core/motion/measures/registry.hpp that grows with the motion.
// Exactly one is given. A measure that grows with the square of the motion (Arias intensity) takes the root of the
// ratio.
#pragma once

#include "core/motion/processing/step.hpp"

namespace pilotis {

struct ScaleTo {
  std::size_t key = 0;  // place among method.parameters: 0 the factor, else a measure
  double value = 1;     // > 0; of the factor, or of the measure in SI

  static const Method method;
  static ScaleTo make(std::span<const double> values);  // throws unless exactly one value is greater than 0
  Processed applied(const Accelerogram& record) const;  // throws when the measure of the record is 0
};

}  // namespace pilotis
