// Ctrl-C and a polite kill ask for a stop instead of ending the process, while this lives.
#pragma once

namespace pilotis {

class InterruptWatch {
 public:
  InterruptWatch();
  ~InterruptWatch();
  InterruptWatch(const InterruptWatch&) = delete;
  InterruptWatch& operator=(const InterruptWatch&) = delete;

  static bool asked();  // since the first watch of this process

 private:
  void (*on_int_)(int);
  void (*on_term_)(int);
};

}  // namespace pilotis
