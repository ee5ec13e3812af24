// Largest magnitude of every quantity, with sign and time. Over the lane scalar.
#pragma once

#include <algorithm>
#include <cmath>
#include <utility>
#include <vector>

#include "core/response/observer.hpp"
#include "core/response/results.hpp"

namespace pilotis {

template <class R>
class PeakWatchOver : public ObserverOver<R> {
 public:
  // Values that are `multiples` of others are not watched: their peaks follow.
  explicit PeakWatchOver(const ResponseLayout& layout, std::vector<Multiple> multiples = {})
      : multiples_(std::move(multiples)),
        largest_(layout.size(), splat<R>(0)),
        value_(largest_),
        when_(largest_),
        between_(largest_),
        before_(largest_),
        recent_(layout.size() + 1),
        is_recent_(layout.size(), 0) {
    std::vector<char> watched(layout.size(), 1);
    for (const Multiple& one : multiples_) watched[one.value] = 0;
    for (std::size_t i = 0; i < watched.size(); ++i) {
      if (watched[i] == 0) continue;
      if (i == 0 || watched[i - 1] == 0) ranges_.push_back({i, i});
      ranges_.back().second = i + 1;
    }
  }

  // A new peak is rare: nearly always one comparison per value, and one look at the outcome of several of them.
  Mask<R> see(const InstantOver<R>& instant) noexcept override {
    bound_recent(instant);
    for (const auto& [from, to] : ranges_) scan(from, to, instant);
    last_step_ = select(instant.seen, R(instant.time - last_time_), last_step_);
    last_time_ = select(instant.seen, instant.time, last_time_);
    seen_ = select(instant.seen, R(seen_ + 1.0), seen_);
    return every_lane<R>();
  }

  void restart(int lane) noexcept override {
    for (std::vector<R>* values : {&largest_, &value_, &when_, &between_, &before_})
      for (R& one : *values) set_lane(one, lane, 0.0);
    for (R* one : {&last_time_, &last_step_, &seen_}) set_lane(*one, lane, 0.0);
  }

  // Flat, ResponseLayout order; step errors not set.
  std::vector<Peak> peaks(int i = 0) const {
    std::vector<Peak> peaks;
    for (std::size_t k = 0; k < value_.size(); ++k) peaks.push_back({lane(value_[k], i), lane(when_[k], i), 0});
    for (const Multiple& one : multiples_)
      if (one.by > 0) peaks[one.value] = {one.by * peaks[one.of].value, peaks[one.of].time, 0};
    return peaks;
  }

  // How far the true extreme may lie above the state kept: at most half a step away from it, hence curvature h^2 / 8
  // with the curvature of the parabola through that state and its two neighbors. SI, >= 0, ResponseLayout order; 0
  // where the peak is the first or the last state seen.
  std::vector<double> between_states(int i = 0) const {
    std::vector<double> rise;
    for (const R& one : between_) rise.push_back(lane(one, i));
    for (const Multiple& one : multiples_) rise[one.value] = one.by * rise[one.of];
    return rise;
  }

 private:
  static constexpr std::size_t block = 4;

  void scan(std::size_t from, std::size_t to, const InstantOver<R>& instant) noexcept {
    const R *values = instant.values, *largest = largest_.data();
    std::size_t i = from;
    for (; i + block <= to; i += block) {
      Mask<R> higher = lane_abs(values[i]) > largest[i];
      for (std::size_t k = 1; k < block; ++k) higher |= lane_abs(values[i + k]) > largest[i + k];
      if (any(higher)) set_peaks(i, i + block, instant);
    }
    set_peaks(i, to, instant);
  }

  void set_peaks(std::size_t from, std::size_t to, const InstantOver<R>& instant) noexcept {
    for (std::size_t i = from; i < to; ++i) {
      const Mask<R> higher = (lane_abs(instant.values[i]) > largest_[i]) & instant.seen;
      if (any(higher)) set_peak(i, instant, higher);
    }
  }

  void set_peak(std::size_t i, const InstantOver<R>& instant, const Mask<R>& higher) noexcept {
    const R value = instant.values[i];
    largest_[i] = select(higher, R(lane_abs(value)), largest_[i]);
    value_[i] = select(higher, value, value_[i]);
    when_[i] = select(higher, instant.time, when_[i]);
    between_[i] = select(higher, splat<R>(0), between_[i]);
    before_[i] = select(higher, instant.previous[i], before_[i]);
    recent_[recent_count_] = i;
    recent_count_ += is_recent_[i] == 0;
    is_recent_[i] = 1;
  }

  // Values whose peak is the last state of some lane. Lanes that were not seen keep theirs waiting.
  void bound_recent(const InstantOver<R>& instant) noexcept {
    for (std::size_t k = 0; k < recent_count_; ++k) bound_rise(recent_[k], instant);
    if (!all(instant.seen)) return;
    for (std::size_t k = 0; k < recent_count_; ++k) is_recent_[recent_[k]] = 0;
    recent_count_ = 0;
  }

  // The peak is the last state; those before and after it stand h0 and h1 away.
  void bound_rise(std::size_t i, const InstantOver<R>& instant) noexcept {
    const Mask<R> lower = lane_abs(instant.values[i]) <= largest_[i];
    const Mask<R> stands = (when_[i] == last_time_) & (seen_ > 1.0) & lower & instant.seen;
    const R h0 = last_step_, h1 = instant.time - last_time_, h = lane_max<R>(h0, h1);
    const R slope0 = (value_[i] - before_[i]) / h0, slope1 = (instant.values[i] - value_[i]) / h1;
    between_[i] = select(stands, R(lane_abs(R(slope1 - slope0)) * 2.0 / (h0 + h1) * h * h / 8.0), between_[i]);
  }

  std::vector<Multiple> multiples_;
  std::vector<std::pair<std::size_t, std::size_t>> ranges_;  // of the values that are watched
  std::vector<R> largest_;                                   // |value_|
  std::vector<R> value_, when_, between_;
  std::vector<R> before_;            // value at the state before the peak
  std::vector<std::size_t> recent_;  // [recent_count_]: values whose peak some lane may have had at its last state
  std::size_t recent_count_ = 0;
  std::vector<char> is_recent_;
  R last_time_ = splat<R>(0), seen_ = splat<R>(0);
  R last_step_ = splat<R>(0);  // s, the one that led to the last state
};
using PeakWatch = PeakWatchOver<double>;

}  // namespace pilotis
