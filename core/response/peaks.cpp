#include "core/response/peaks.hpp"

#include <cmath>

namespace pilotis {

bool PeakWatch::see(const Instant& instant) noexcept {
  for (std::size_t i = 0; i < peaks_.size(); ++i)
    if (std::abs(instant.values[i]) > std::abs(peaks_[i].value)) peaks_[i] = {instant.values[i], instant.time, 0};
  return true;
}

}  // namespace pilotis
