// Values over time of chosen quantities, at whole steps, every n-th of them. Over the lane scalar: each lane keeps its
// own run's.
#pragma once

#include <array>
#include <vector>

#include "core/response/observer.hpp"
#include "core/response/results.hpp"

namespace pilotis {

template <class R>
class HistoryKeeperOver : public ObserverOver<R> {
 public:
  // `every` >= 1; `steps` is how many whole steps the march will take, to reserve memory once.
  HistoryKeeperOver(const ResponseLayout& layout, const std::vector<const Quantity*>& kept, int every, long steps)
      : layout_(layout), every_(every) {
    for (int i = 0; i < LaneTraits<R>::width; ++i) begin(i, kept, steps);
  }

  // A new run in this lane, and what is kept of it. Allocates: between runs only.
  void begin(int lane, const std::vector<const Quantity*>& kept, long steps) {
    Reel& reel = reels_[lane];
    const std::size_t rows = kept.empty() ? 0 : static_cast<std::size_t>(steps / every_ + 1);
    reel = {};
    reel.times.reserve(rows);
    for (const Quantity* quantity : kept) {
      reel.histories.push_back({quantity, {}});
      reel.histories.back().values.reserve(rows * layout_.count(*quantity));
    }
  }

  Mask<R> see(const InstantOver<R>& instant) noexcept override {
    for (int i = 0; i < LaneTraits<R>::width; ++i)
      if (!reels_[i].histories.empty() && flag(instant.seen, i) && flag(instant.whole_step, i) &&
          instant.state.clock[i].step % every_ == 0)
        keep(instant, i);
    return every_lane<R>();
  }

  const std::vector<double>& times(int lane = 0) const { return reels_[lane].times; }  // s
  const std::vector<History>& histories(int lane = 0) const { return reels_[lane].histories; }

 private:
  struct Reel {
    std::vector<double> times;
    std::vector<History> histories;
  };

  void keep(const InstantOver<R>& instant, int i) noexcept {
    reels_[i].times.push_back(lane(instant.time, i));
    for (History& history : reels_[i].histories) {
      const R* first = instant.values + layout_.offset(*history.quantity);
      for (std::size_t k = 0; k < layout_.count(*history.quantity); ++k) history.values.push_back(lane(first[k], i));
    }
  }

  ResponseLayout layout_;
  int every_;
  std::array<Reel, LaneTraits<R>::width> reels_;
};
using HistoryKeeper = HistoryKeeperOver<double>;

}  // namespace pilotis
