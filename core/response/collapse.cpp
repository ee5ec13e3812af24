#include "core/response/collapse.hpp"

#include <cmath>

namespace pilotis {

CollapseWatch::CollapseWatch(const ResponseLayout& layout, double ratio)
    : offset_(layout.offset(*find_quantity("drift_ratio"))), stories_(layout.stories()), ratio_(ratio) {}

bool CollapseWatch::see(const Instant& instant) noexcept {
  for (int i = 0; i < stories_; ++i)
    if (std::abs(instant.values[offset_ + i]) > ratio_) {
      story_ = i + 1;
      return false;
    }
  return true;
}

}  // namespace pilotis
