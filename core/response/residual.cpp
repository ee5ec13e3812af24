#include "core/response/residual.hpp"

#include <algorithm>

namespace pilotis {

ResidualWatch::ResidualWatch(const ResponseLayout& layout, double from)
    : offset_(layout.offset(*find_quantity("drift"))), from_(from) {
  last_.assign(layout.stories(), 0.0);
  integral_ = least_ = most_ = last_;
}

bool ResidualWatch::see(const Instant& instant) noexcept {
  const double* drift = instant.values + offset_;
  const bool starts = !inside_ && instant.time >= from_;
  for (std::size_t i = 0; i < last_.size(); ++i) {
    if (starts) least_[i] = most_[i] = drift[i];
    if (inside_) integral_[i] += 0.5 * (instant.time - last_time_) * (last_[i] + drift[i]);
    least_[i] = std::min(least_[i], drift[i]);
    most_[i] = std::max(most_[i], drift[i]);
    last_[i] = drift[i];
  }
  if (starts) started_ = instant.time;
  inside_ = inside_ || starts;
  last_time_ = instant.time;
  return true;
}

std::vector<double> ResidualWatch::drift() const {
  const double length = last_time_ - started_;
  if (!inside_ || length <= 0) return last_;
  std::vector<double> mean = integral_;
  for (double& value : mean) value /= length;
  return mean;
}

std::vector<double> ResidualWatch::swing() const {
  std::vector<double> half(last_.size(), 0.0);
  if (inside_)
    for (std::size_t i = 0; i < half.size(); ++i) half[i] = 0.5 * (most_[i] - least_[i]);
  return half;
}

}  // namespace pilotis
