// Shows observers what a test has prepared, as a march would.
#pragma once

#include <vector>

#include "core/response/observer.hpp"
#include "core/response/reader.hpp"
#include "core/system/load.hpp"

namespace pilotis::test {

// Flat values alone, for observers that look at nothing else.
class Screen {
 public:
  explicit Screen(int stories) : layout(stories), values(layout.size(), 0.0) {}

  void set(std::string_view name, int place, double value) {  // place counted from 1
    values[layout.offset(*find_quantity(name)) + place - 1] = value;
  }
  bool show(Observer& observer, double time, bool whole_step = true) {
    const bool go_on =
        observer.see({time, whole_step, state, nullptr, 0, values.data(), nullptr, nullptr, nullptr, previous_.data()});
    previous_ = values;
    return go_on;
  }

  ResponseLayout layout;
  std::vector<double> values;
  State<double> state;

 private:
  std::vector<double> previous_ = values;
};

// A state of a system, with everything read off it.
class Stage {
 public:
  Stage(const System& system, const Load& load)
      : load_(load), reader_(system), forces_(system.freedoms), values_(reader_.layout().size()) {}

  bool show(Observer& observer, const State<double>& state, double time) {
    load_.at(time, forces_.data());
    const double ground = load_.ground(time);
    reader_.read(state, forces_.data(), ground, values_.data());
    const bool go_on =
        observer.see({time, true, state, forces_.data(), ground, values_.data(), reader_.acceleration().data(),
                      reader_.forces().damping.data(), reader_.forces().deformation.data(), previous_.data()});
    previous_ = values_;
    return go_on;
  }

 private:
  const Load& load_;
  ResponseReader reader_;
  std::vector<double> forces_, values_, previous_ = values_;
};

}  // namespace pilotis::test
