#include "apps/progress.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cstdio>
#include <string>

namespace pilotis {

namespace {

constexpr int bar_width = 24;

std::string bar(double share) {
  const int filled = std::clamp(static_cast<int>(share * bar_width), 0, bar_width);
  return std::string(filled, '#') + std::string(bar_width - filled, '.');
}

std::string time_left(double seconds) {
  if (!(seconds < 1e9)) return "time left unknown";
  const auto whole = static_cast<long>(seconds + 0.5);
  if (whole < 120) return fmt::format("{} s left", whole);
  if (whole < 7200) return fmt::format("{} min left", whole / 60);
  return fmt::format("{} h {:02} min left", whole / 3600, whole / 60 % 60);
}

}  // namespace

void Progress::show(double done, long all, long failures) {
  using seconds = std::chrono::duration<double>;
  const auto now = Clock::now();
  const double elapsed = seconds(now - begin_).count(), since_last = seconds(now - last_).count();
  if (quiet_ || elapsed < 0.5 || since_last < (terminal_ ? 0.1 : 10.0)) return;
  last_ = now;
  const double rate = (done - static_cast<double>(before_)) / elapsed;
  const double whole = static_cast<double>(all);
  const std::string text =
      fmt::format("{}/{} {}, {:.3g} {}/s, {}{}", static_cast<long>(done), all, things_, rate, things_,
                  time_left((whole - done) / rate), failures > 0 ? fmt::format(", {} failed", failures) : "");
  if (terminal_)
    fmt::print(stderr, "\r\033[K[{}] {}", bar(done / whole), text);
  else
    fmt::print(stderr, "{}\n", text);
  std::fflush(stderr);
  bar_on_screen_ = terminal_;
}

void Progress::finish() {
  if (bar_on_screen_) fmt::print(stderr, "\r\033[K");
  bar_on_screen_ = false;
}

}  // namespace pilotis
