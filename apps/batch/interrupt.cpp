#include "apps/batch/interrupt.hpp"

#include <csignal>

namespace pilotis {

namespace {

volatile std::sig_atomic_t interrupted = 0;
void interrupt(int) { interrupted = 1; }

}  // namespace

InterruptWatch::InterruptWatch() : on_int_(std::signal(SIGINT, interrupt)), on_term_(std::signal(SIGTERM, interrupt)) {}

InterruptWatch::~InterruptWatch() {
  std::signal(SIGINT, on_int_);
  std::signal(SIGTERM, on_term_);
}

bool InterruptWatch::asked() { return interrupted != 0; }

}  // namespace pilotis
