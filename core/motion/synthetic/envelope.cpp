#include "core/motion/synthetic/envelope.hpp"

#include <cmath>

namespace pilotis {

double Envelope::at(double time) const {
  if (time < rise_end) return (time / rise_end) * (time / rise_end);
  return time <= strong_end ? 1 : std::exp(-(time - strong_end) / decay_time);
}

}  // namespace pilotis
