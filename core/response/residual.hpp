// What stays bent: the mean drift over a window at the end of the march, and how much it still swings there.
#pragma once

#include "core/response/observer.hpp"
#include "core/response/quantities.hpp"

namespace pilotis {

// The window is [from, end of march]; the engine takes the last fundamental period, or the tail where that is shorter,
// so that what still vibrates averages out. Common practice; no source.
class ResidualWatch : public Observer {
 public:
  ResidualWatch(const ResponseLayout& layout, double from);
  bool see(const Instant& instant) noexcept override;
  // Time-weighted mean (trapezoids), m, [story], signed; the last value seen when the window held one instant or none.
  std::vector<double> drift() const;
  // Half the range within the window, m, [story].
  std::vector<double> swing() const;

 private:
  std::size_t offset_;
  double from_;
  double started_ = 0, last_time_ = 0;
  bool inside_ = false;
  std::vector<double> last_, integral_, least_, most_;
};

}  // namespace pilotis
