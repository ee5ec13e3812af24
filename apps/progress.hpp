// Progress on standard error: a bar with rate, time left and failures on a terminal, plain lines elsewhere. Nothing for
// work that is done within half a second.
#pragma once

#include <chrono>

namespace pilotis {

class Progress {
 public:
  // `quiet`: shows nothing at all. `before`: of `all`, how many were there when it began: they tell nothing of the
  // rate. `what`: the things counted.
  Progress(bool terminal, bool quiet, long before = 0, const char* what = "runs")
      : terminal_(terminal), quiet_(quiet), before_(before), what_(what) {}
  // Done so far, a part of one in hand included.
  void show(double done, long all, long failures = 0);
  void finish();  // takes the bar off the terminal

 private:
  using Clock = std::chrono::steady_clock;
  bool terminal_, quiet_;
  long before_;
  const char* what_;
  bool bar_on_screen_ = false;
  Clock::time_point begin_ = Clock::now(), last_ = begin_;
};

}  // namespace pilotis
