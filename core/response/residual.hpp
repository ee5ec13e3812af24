// What stays bent: the mean drift over a window at the end of the march, and how much it still swings there. Over the
// lane scalar: each lane has its own window.
#pragma once

#include <algorithm>
#include <vector>

#include "core/response/observer.hpp"
#include "core/response/quantities.hpp"

namespace pilotis {

// The window is [from, end of march]; the engine takes the last fundamental period, or the tail where that is shorter,
// so that what still vibrates averages out. Common practice; no source.
template <class R>
class ResidualWatchOver : public ObserverOver<R> {
 public:
  ResidualWatchOver(const ResponseLayout& layout, double from)
      : offset_(layout.offset(*find_quantity("drift"))),
        from_(splat<R>(from)),
        last_(layout.stories(), splat<R>(0)),
        integral_(last_),
        least_(last_),
        most_(last_) {}

  // Sets the window of the run in one lane, s.
  void set_window(int lane, double from) noexcept { set_lane(from_, lane, from); }

  Mask<R> see(const InstantOver<R>& instant) noexcept override {
    const Mask<R> late = (instant.time >= from_) & instant.seen;
    if (any(late)) add(instant, late);
    if (all(instant.seen))
      std::copy_n(instant.values + offset_, last_.size(), last_.begin());
    else
      for (std::size_t i = 0; i < last_.size(); ++i)
        last_[i] = select(instant.seen, instant.values[offset_ + i], last_[i]);
    last_time_ = select(instant.seen, instant.time, last_time_);
    return every_lane<R>();
  }

  void restart(int lane) noexcept override {
    for (std::vector<R>* values : {&last_, &integral_, &least_, &most_})
      for (R& one : *values) set_lane(one, lane, 0.0);
    for (R* one : {&started_, &last_time_, &inside_}) set_lane(*one, lane, 0.0);
  }

  // Time-weighted mean (trapezoids), m, [story], signed; the last value seen when the window held one instant or none.
  std::vector<double> drift(int i = 0) const {
    const double length = lane(last_time_, i) - lane(started_, i);
    const bool averaged = lane(inside_, i) != 0 && length > 0;
    std::vector<double> mean;
    for (std::size_t k = 0; k < last_.size(); ++k)
      mean.push_back(averaged ? lane(integral_[k], i) / length : lane(last_[k], i));
    return mean;
  }

  // Half the range within the window, m, [story].
  std::vector<double> swing(int i = 0) const {
    std::vector<double> half(last_.size(), 0.0);
    if (lane(inside_, i) != 0)
      for (std::size_t k = 0; k < half.size(); ++k) half[k] = 0.5 * (lane(most_[k], i) - lane(least_[k], i));
    return half;
  }

 private:
  // Lanes in `late` are in their window now; those with inside_ were so before.
  void add(const InstantOver<R>& instant, const Mask<R>& late) noexcept {
    const Mask<R> inside = (inside_ != 0.0) & late, starts = (inside_ == 0.0) & late;
    const R half_step = select(inside, R(0.5 * (instant.time - last_time_)), splat<R>(0));
    for (std::size_t i = 0; i < last_.size(); ++i) {
      const R drift = instant.values[offset_ + i];
      integral_[i] += half_step * (last_[i] + drift);
      least_[i] = select(starts | ((drift < least_[i]) & late), drift, least_[i]);
      most_[i] = select(starts | ((drift > most_[i]) & late), drift, most_[i]);
    }
    started_ = select(starts, instant.time, started_);
    inside_ = select(starts, splat<R>(1), inside_);
  }

  std::size_t offset_;
  R from_;
  R started_ = splat<R>(0), last_time_ = splat<R>(0);
  R inside_ = splat<R>(0);  // 1 in lanes whose window has begun
  std::vector<R> last_, integral_, least_, most_;
};
using ResidualWatch = ResidualWatchOver<double>;

}  // namespace pilotis
