// Stops a march when a story drifts past the collapse ratio.
#pragma once

#include "core/response/observer.hpp"
#include "core/response/quantities.hpp"

namespace pilotis {

class CollapseWatch : public Observer {
 public:
  // `ratio` > 0, drift / height.
  CollapseWatch(const ResponseLayout& layout, double ratio);
  bool see(const Instant& instant) noexcept override;
  int story() const { return story_; }  // counted from 1; 0: none passed it

 private:
  std::size_t offset_;
  int stories_;
  double ratio_;
  int story_ = 0;
};

}  // namespace pilotis
