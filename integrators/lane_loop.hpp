// The one stepping loop: load -> step -> finite check -> observers, over the lane scalar. Every lane marches its own
// run on its own clock; when one ends the next is put into its place, so that no lane idles while runs are left. A lone
// run is the loop over one lane.
#pragma once

#include <algorithm>
#include <atomic>
#include <cmath>
#include <span>
#include <vector>

#include "core/response/observer.hpp"
#include "core/response/reader.hpp"
#include "core/system/load.hpp"
#include "integrators/march.hpp"

namespace pilotis {

// What is to be marched in one lane: time is n dt, until `end` whole steps are taken.
struct LaneRun {
  const Load* load = nullptr;
  double dt = 0;  // s
  long end = 0;
};

// What became of a step: lanes that took it, and those that never can; the others want a smaller one.
template <class R>
struct Taken {
  Mask<R> done;
  Mask<R> failed{};
  R share = splat<R>(1);        // of dt that was taken, (0, 1]; less than 1 only for adaptive schemes
  Forces<R>* forces = nullptr;  // at the new state, where the scheme has them at hand; good for lanes that are done
};

// Take: Taken<R> operator()(State<R>&, const LoadStepOver<R>&), noexcept.
// Feed: bool next(int lane, LaneRun&, State<R>&) puts the next run into a lane and restarts the lane's observers; false
//       when there is none. void ended(int lane, const MarchEnd&, const State<R>&) collects what the observers hold of
//       it.
template <class R>
class LaneLoop {
 public:
  static constexpr int width = LaneTraits<R>::width;

  LaneLoop(const System& system, int halvings, std::span<ObserverOver<R>* const> observers)
      : system_(system),
        smallest_(std::ldexp(1.0, -halvings)),
        observers_(observers),
        reader_(system),
        state_(state_at_rest<R>(system)),
        values_(reader_.layout().size(), splat<R>(0)),
        previous_(values_),
        before_(system.freedoms, splat<R>(0)),
        after_(before_) {}

  // Marches all the feed has. False when `stop` was set meanwhile: the runs in hand are then given up.
  template <class Take, class Feed>
  bool run(Take& take, Feed& feed, const std::atomic<bool>* stop) {
    for (int i = 0; i < width; ++i) fill(i, feed);
    while (busy_ > 0) {
      if (stop != nullptr && stop->load(std::memory_order_relaxed)) return false;
      look_ahead();
      const Taken<R> taken = take(state_, {dt_, before_.data(), after_.data()});
      const Mask<R> accepted = judged(taken);
      move_on(taken, accepted);
      Mask<R> stopped{};
      if (any(accepted)) stopped = negated(show(accepted, taken.forces)) & accepted;
      for (int i = 0; i < width; ++i) {
        Lane& lane = lanes_[i];
        if (!lane.busy) continue;
        if (flag(stopped, i)) lane.verdict = MarchEnding::stopped, lane.over = true;
        if (!lane.over && state_.clock[i].step >= lane.run.end) lane.over = true;
        if (!lane.over) continue;
        report(i, feed);
        fill(i, feed);
      }
    }
    return true;
  }

 private:
  struct Lane {
    LaneRun run;
    double share = 1;  // of a whole step to try next
    Clock next;        // where that leads
    bool busy = false, over = false;
    MarchEnding verdict = MarchEnding::done;
  };

  static double time_of(const Clock& clock, double dt) noexcept {
    return (static_cast<double>(clock.step) + clock.fraction) * dt;
  }

  static Clock advanced(const Clock& clock, double share) noexcept {
    const double fraction = clock.fraction + share;
    return fraction < 1 - 1e-12 ? Clock{clock.step, fraction} : Clock{clock.step + 1, 0};
  }

  // Loads at the end of the step each lane will try.
  void look_ahead() noexcept {
    R ground = splat<R>(0);
    for (int i = 0; i < width; ++i) {
      Lane& one = lanes_[i];
      if (!one.busy) continue;
      one.share = std::min(one.share, 1 - state_.clock[i].fraction);
      one.next = advanced(state_.clock[i], one.share);
      set_lane(dt_, i, one.share * one.run.dt);
      set_lane(ground, i, one.run.load->ground(time_of(one.next, one.run.dt)));
    }
    ground_after_ = ground;
    const std::vector<double>& weights = *minus_mass_influence_;
    for (std::size_t k = 0; k < after_.size(); ++k) after_[k] = weights[k] * ground;
    if (!floor_forces_) return;
    for (int i = 0; i < width; ++i)
      if (lanes_[i].busy)
        lanes_[i].run.load->add_floor_forces(time_of(lanes_[i].next, lanes_[i].run.dt), after_.data(), i);
  }

  // Lanes whose new state counts. Notes how the others go on: at half the step, or not at all.
  Mask<R> judged(const Taken<R>& taken) noexcept {
    const Mask<R> finite = finite_lanes();
    Mask<R> accepted = taken.done & finite & active_;
    if (all(accepted)) return accepted;
    for (int i = 0; i < width; ++i) {
      Lane& one = lanes_[i];
      if (!one.busy || flag(accepted, i)) continue;
      const bool can_shrink = !flag(taken.done, i) && !flag(taken.failed, i) && one.share > smallest_;
      if (can_shrink) {
        one.share /= 2;
        continue;
      }
      one.over = true;
      one.verdict = flag(taken.done, i) || !loads_finite(i) ? MarchEnding::not_finite : MarchEnding::not_converged;
    }
    return accepted;
  }

  Mask<R> finite_lanes() const noexcept {
    R sum = splat<R>(0);  // a non-finite member makes the difference below NaN
    for (std::size_t k = 0; k < state_.u.size(); ++k) sum += lane_abs(state_.u[k]) + lane_abs(state_.v[k]);
    return sum - sum == 0.0;
  }

  bool loads_finite(int i) const noexcept {
    double sum = 0;
    for (std::size_t k = 0; k < after_.size(); ++k) sum += std::abs(lane(before_[k], i)) + std::abs(lane(after_[k], i));
    return std::isfinite(sum);
  }

  // Clocks and loads of the lanes that were accepted.
  void move_on(const Taken<R>& taken, const Mask<R>& accepted) noexcept {
    bool cut_short = false;
    for (int i = 0; i < width; ++i) {
      if (!flag(accepted, i)) continue;
      const double share = lane(taken.share, i);
      cut_short = cut_short || share < 1;
      state_.clock[i] = share < 1 ? advanced(state_.clock[i], share * lanes_[i].share) : lanes_[i].next;
      if (share < 1 || state_.clock[i].fraction == 0) lanes_[i].share = 1;
    }
    if (all(accepted)) {
      std::swap(before_, after_);
    } else {
      for (std::size_t k = 0; k < before_.size(); ++k) before_[k] = select(accepted, after_[k], before_[k]);
    }
    ground_ = select(accepted, ground_after_, ground_);
    if (cut_short)
      for (int i = 0; i < width; ++i)
        if (flag(accepted, i)) load_lane(i);
  }

  // The load where a lane stands.
  void load_lane(int i) noexcept {
    const LaneRun& run = lanes_[i].run;
    const double time = time_of(state_.clock[i], run.dt), ground = run.load->ground(time);
    set_lane(ground_, i, ground);
    for (std::size_t k = 0; k < before_.size(); ++k) set_lane(before_[k], i, (*minus_mass_influence_)[k] * ground);
    run.load->add_floor_forces(time, before_.data(), i);
  }

  // Shows the states of these lanes; gives the lanes that may go on.
  Mask<R> show(const Mask<R>& seen, Forces<R>* known) noexcept {
    reader_.read(state_, before_.data(), ground_, values_.data(), known);
    R time = splat<R>(0);
    Mask<R> whole{};
    for (int i = 0; i < width; ++i) {
      set_lane(time, i, time_of(state_.clock[i], lanes_[i].run.dt));
      set_flag(whole, i, state_.clock[i].fraction == 0);
    }
    const InstantOver<R> instant{time,
                                 whole,
                                 state_,
                                 before_.data(),
                                 ground_,
                                 values_.data(),
                                 reader_.acceleration().data(),
                                 reader_.forces().damping.data(),
                                 reader_.forces().deformation.data(),
                                 previous_.data(),
                                 seen};
    Mask<R> go_on = every_lane<R>();
    for (ObserverOver<R>* observer : observers_) go_on = observer->see(instant) & go_on;
    if (all(seen))
      std::swap(values_, previous_);
    else
      for (std::size_t k = 0; k < values_.size(); ++k) previous_[k] = select(seen, values_[k], previous_[k]);
    return go_on;
  }

  // Tells the feed that the run in a lane is over.
  template <class Feed>
  void report(int i, Feed& feed) {
    lanes_[i].busy = false;
    --busy_;
    set_flag(active_, i, false);
    feed.ended(i, {lanes_[i].verdict, time_of(state_.clock[i], lanes_[i].run.dt)}, state_);
  }

  // Puts the next run into a lane, or rests it. Runs that are over at their very start are reported at once.
  template <class Feed>
  void fill(int i, Feed& feed) {
    for (;;) {
      lanes_[i] = {};
      if (!feed.next(i, lanes_[i].run, state_)) return rest(i);
      if (begins(i)) return;
      report(i, feed);
    }
  }

  // Sets up the lane for its run and shows its first state; false when the run is over with that.
  bool begins(int i) {
    Lane& one = lanes_[i];
    minus_mass_influence_ = &one.run.load->minus_mass_influence();
    floor_forces_ = floor_forces_ || one.run.load->has_floor_forces();
    one.busy = true;
    ++busy_;
    set_flag(active_, i, true);
    load_lane(i);
    if (state_.clock[i].step == 0 && state_.clock[i].fraction == 0) {
      Mask<R> alone{};
      set_flag(alone, i, true);
      if (!flag(show(alone, nullptr), i)) {
        one.verdict = MarchEnding::stopped;
        return false;
      }
    }
    return state_.clock[i].step < one.run.end;
  }

  // A lane without a run stays at zero under no load.
  void rest(int i) noexcept {
    put_lane(state_at_rest<double>(system_), state_, i);
    set_lane(ground_, i, 0.0);
    for (R& force : before_) set_lane(force, i, 0.0);
  }

  const System& system_;
  double smallest_;  // share of a whole step
  std::span<ObserverOver<R>* const> observers_;
  ResponseReaderOver<R> reader_;
  State<R> state_;
  std::vector<R> values_, previous_;  // of the state in hand, and of the one each lane showed before
  std::vector<R> before_, after_;     // loads where the lanes stand, and where their steps lead, N
  R ground_ = splat<R>(0), ground_after_ = splat<R>(0), dt_ = splat<R>(0);
  std::array<Lane, width> lanes_;
  Mask<R> active_{};
  int busy_ = 0;
  bool floor_forces_ = false;
  const std::vector<double>* minus_mass_influence_ = nullptr;  // the same in the loads of all lanes
};

}  // namespace pilotis
