// Progress on standard error: a bar with rate, time left and failures on a terminal, plain lines elsewhere. Nothing for
// work that is done within half a second.
#pragma once

#include <chrono>
#include <string>

namespace pilotis {

class Progress {
 public:
  // `quiet`: shows nothing at all. `before`: of `all`, how many were there when it began: they tell nothing of the
  // rate. `things`: what is counted.
  Progress(bool terminal, bool quiet, long before = 0, std::string things = "runs")
      : terminal_(terminal), quiet_(quiet), before_(before), things_(std::move(things)) {}
  // Done so far, a part of one in hand included.
  void show(double done, long all, long failures = 0);
  void finish();  // takes the bar off the terminal

 private:
  using Clock = std::chrono::steady_clock;
  bool terminal_, quiet_;
  long before_;
  std::string things_;
  bool bar_on_screen_ = false;
  Clock::time_point begin_ = Clock::now(), last_ = begin_;
};

}  // namespace pilotis
