// One march of a run with everything that is always observed: what goes in, what comes out, and the observers between.
#pragma once

#include <array>
#include <span>
#include <vector>

#include "core/response/collapse.hpp"
#include "core/response/energy.hpp"
#include "core/response/histories.hpp"
#include "core/response/peaks.hpp"
#include "core/response/reader.hpp"
#include "core/response/residual.hpp"
#include "integrators/march.hpp"

namespace pilotis {

// What is to be marched.
struct MarchTask {
  const Load* load = nullptr;
  double dt = 0;             // s
  long steps = 0;            // whole steps
  double residual_from = 0;  // s, where the window of the residual drift begins
  bool keep_histories = true;
};

// What is the same for all marches of a batch.
struct BatchSettings {
  double tolerance = 1e-9;  // Newton: of the largest load (or the largest initial internal force)
  int halvings = 10;
  double collapse_drift_ratio = 0.10;
  WorkRule work_rule = WorkRule::trapezoid;
  std::vector<const Quantity*> histories;
  int every = 1;
  std::vector<double> initial_displacement, initial_velocity;  // m, m/s, [floor]; empty: at rest
};

// What came of it; ResponseLayout order, SI.
struct Marched {
  MarchEnd end;
  std::vector<Peak> peaks;
  std::vector<double> between_states;
  std::vector<double> residual_drift, residual_swing;  // m, [story]
  Energies energies;                                   // J, at the end
  double energy_error = 0;
  int collapsed_story = 0;  // counted from 1; 0: none
  std::vector<double> times;
  std::vector<History> histories;
};

// u, v, a and memories at t = 0.
State<double> initial_state(const System& system, const Load& load, const BatchSettings& settings);

// N; the largest out-of-balance force a step may leave: `settings.tolerance` of the largest load, or force on a freedom
// at the start.
double step_tolerance(const System& system, const Load& load, const State<double>& start,
                      const BatchSettings& settings);

template <class R>
class Watches {
 public:
  Watches(const System& system, const BatchSettings& settings)
      : settings_(settings),
        layout_(static_cast<int>(system.stories.height.size())),
        peaks_(layout_, ReaderPlan(system).multiples()),
        residual_(layout_, 0),
        collapse_(layout_, settings.collapse_drift_ratio),
        energy_(system, settings.work_rule),
        histories_(layout_, {}, settings.every, 0) {}
  Watches(const Watches&) = delete;
  Watches& operator=(const Watches&) = delete;

  std::span<ObserverOver<R>* const> all() const { return all_; }

  void restart(int lane, const MarchTask& task) {
    for (ObserverOver<R>* observer : all_) observer->restart(lane);
    residual_.set_window(lane, task.residual_from);
    histories_.begin(lane, task.keep_histories ? settings_.histories : std::vector<const Quantity*>{}, task.steps);
  }

  Marched collected(int lane, const MarchEnd& end) const {
    return {end,
            peaks_.peaks(lane),
            peaks_.between_states(lane),
            residual_.drift(lane),
            residual_.swing(lane),
            energy_.now(lane),
            energy_.error(lane),
            collapse_.story(lane),
            histories_.times(lane),
            histories_.histories(lane)};
  }

 private:
  const BatchSettings& settings_;
  ResponseLayout layout_;
  PeakWatchOver<R> peaks_;
  ResidualWatchOver<R> residual_;
  CollapseWatchOver<R> collapse_;
  EnergyWatchOver<R> energy_;
  HistoryKeeperOver<R> histories_;
  std::array<ObserverOver<R>*, 5> all_{&peaks_, &residual_, &energy_, &histories_, &collapse_};
};

}  // namespace pilotis
