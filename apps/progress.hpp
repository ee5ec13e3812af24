// Progress on standard error: a bar with rate and time left on a terminal, plain lines elsewhere. Nothing for work that
// is done within half a second.
#pragma once

#include <chrono>

namespace pilotis {

class Progress {
 public:
  // `quiet`: shows nothing at all.
  Progress(bool terminal, bool quiet) : terminal_(terminal), quiet_(quiet) {}
  void show(long done, long all);
  void finish();  // takes the bar off the terminal

 private:
  using Clock = std::chrono::steady_clock;
  bool terminal_, quiet_;
  bool bar_on_screen_ = false;
  Clock::time_point begin_ = Clock::now(), last_ = begin_;
};

}  // namespace pilotis
