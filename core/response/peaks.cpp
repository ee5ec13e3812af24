#include "core/response/peaks.hpp"

#include <algorithm>
#include <cmath>

namespace pilotis {

PeakWatch::PeakWatch(const ResponseLayout& layout)
    : peaks_(layout.size()), between_(layout.size(), 0.0), last_(layout.size(), 0.0), before_last_(last_) {}

bool PeakWatch::see(const Instant& instant) noexcept {
  for (std::size_t i = 0; i < peaks_.size(); ++i) {
    const double value = instant.values[i];
    if (std::abs(value) > std::abs(peaks_[i].value)) {
      peaks_[i] = {value, instant.time, 0};
      between_[i] = 0;
    } else if (seen_ > 1 && peaks_[i].time == last_time_) {
      bound_rise(i, instant);
    }
    before_last_[i] = last_[i];
    last_[i] = value;
  }
  before_last_time_ = last_time_;
  last_time_ = instant.time;
  ++seen_;
  return true;
}

// The peak is last_; the states before and after it stand h0 and h1 away.
void PeakWatch::bound_rise(std::size_t i, const Instant& instant) noexcept {
  const double h0 = last_time_ - before_last_time_, h1 = instant.time - last_time_, h = std::max(h0, h1);
  const double slope0 = (last_[i] - before_last_[i]) / h0, slope1 = (instant.values[i] - last_[i]) / h1;
  between_[i] = std::abs(slope1 - slope0) * 2 / (h0 + h1) * h * h / 8;
}

}  // namespace pilotis
