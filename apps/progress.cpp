#include "apps/progress.hpp"

#include <fmt/format.h>

#include <cstdio>
#include <string>

namespace pilotis {

namespace {

constexpr int bar_width = 30;

std::string bar(double share) {
  const int filled = static_cast<int>(share * bar_width);
  return std::string(filled, '#') + std::string(bar_width - filled, '.');
}

}  // namespace

void Progress::show(long done, long all) {
  using seconds = std::chrono::duration<double>;
  const auto now = Clock::now();
  const double elapsed = seconds(now - begin_).count(), since_last = seconds(now - last_).count();
  if (quiet_ || elapsed < 0.5 || since_last < (terminal_ ? 0.1 : 10.0)) return;
  last_ = now;
  const double rate = done / elapsed, left = (all - done) / rate;
  if (terminal_)
    fmt::print(stderr, "\r[{}] {}/{} runs, {:.3g} runs/s, {:.0f} s left ", bar(double(done) / all), done, all, rate,
               left);
  else
    fmt::print(stderr, "{}/{} runs, {:.3g} runs/s, {:.0f} s left\n", done, all, rate, left);
  std::fflush(stderr);
  bar_on_screen_ = terminal_;
}

void Progress::finish() {
  if (bar_on_screen_) fmt::print(stderr, "\r{:79}\r", "");
  bar_on_screen_ = false;
}

}  // namespace pilotis
