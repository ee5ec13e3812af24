// Stops a march when a story drifts past the collapse ratio.
#pragma once

#include <array>

#include "core/response/observer.hpp"
#include "core/response/quantities.hpp"

namespace pilotis {

template <class R>
class CollapseWatchOver : public ObserverOver<R> {
 public:
  // `ratio` > 0, drift / height.
  CollapseWatchOver(const ResponseLayout& layout, double ratio)
      : offset_(layout.offset(*find_quantity("drift_ratio"))), stories_(layout.stories()), ratio_(ratio) {}

  Mask<R> see(const InstantOver<R>& instant) noexcept override {
    R largest = splat<R>(0);
    for (int i = 0; i < stories_; ++i) largest = lane_max<R>(largest, lane_abs(instant.values[offset_ + i]));
    const Mask<R> fallen = (largest > ratio_) & instant.seen;
    if (any(fallen)) name_stories(instant, fallen);
    return negated(fallen);
  }

  void restart(int lane) noexcept override { story_[lane] = 0; }

  int story(int lane = 0) const { return story_[lane]; }  // the lowest, counted from 1; 0: none passed it

 private:
  void name_stories(const InstantOver<R>& instant, const Mask<R>& fallen) noexcept {
    for (int k = 0; k < LaneTraits<R>::width; ++k)
      for (int i = stories_ - 1; i >= 0 && flag(fallen, k); --i)
        if (lane(lane_abs(instant.values[offset_ + i]), k) > ratio_) story_[k] = i + 1;
  }

  std::size_t offset_;
  int stories_;
  double ratio_;
  std::array<int, LaneTraits<R>::width> story_{};
};
using CollapseWatch = CollapseWatchOver<double>;

}  // namespace pilotis
