#include "core/motion/synthetic/random.hpp"

#include <cmath>
#include <numbers>

namespace pilotis {

double NormalNumbers::uniform() { return static_cast<double>((generator_() >> 11) + 1) * 0x1p-53; }

double NormalNumbers::next() {
  if (has_spare_) {
    has_spare_ = false;
    return spare_;
  }
  const double radius = std::sqrt(-2 * std::log(uniform()));
  const double angle = 2 * std::numbers::pi * uniform();
  spare_ = radius * std::sin(angle);
  has_spare_ = true;
  return radius * std::cos(angle);
}

}  // namespace pilotis
