// Energy balance of a march, relative to the moving ground: input = kinetic + damping + absorbed + elastic.
// (Relative energy formulation: Uang & Bertero, "Evaluation of seismic energy in structures", Earthq. Eng. Struct. Dyn.
// 19 (1990) 77.) Energies of position and speed are exact functions of the state, and so is what the laws absorb; only
// the work of the load and of damping is summed over the steps. The error left over measures the marching. Over the
// lane scalar.
#pragma once

#include <algorithm>
#include <cmath>
#include <vector>

#include "core/response/observer.hpp"
#include "core/system/kernel.hpp"

namespace pilotis {

// How the work over a step is summed: it must be no coarser than the scheme.
//   trapezoid  force times displacement increment: conjugate to the second-order schemes
//   corrected  power by the trapezoid rule with end correction (fourth order), for schemes above second order
enum class WorkRule { trapezoid, corrected };

template <class R>
struct EnergiesOver {  // J
  R input{}, kinetic{}, damping{}, absorbed{}, elastic{};
  R imbalance() const { return input - kinetic - damping - absorbed - elastic; }
};
using Energies = EnergiesOver<double>;

template <class R>
class EnergyWatchOver : public ObserverOver<R> {
 public:
  EnergyWatchOver(const System& system, WorkRule rule)
      : system_(system),
        rule_(rule),
        with_stiffness_(!is_zero(system.stiffness)),
        last_u_(system.freedoms, splat<R>(0)),
        last_v_(last_u_),
        last_load_(last_u_),
        last_damping_(last_u_),
        scratch_(last_u_),
        last_memory_(state_at_rest<R>(system).memory) {}

  Mask<R> see(const InstantOver<R>& instant) noexcept override {
    EnergiesOver<R> now = now_;
    add_work(instant, now);
    add_absorbed(instant, now);
    read_state(instant, now);
    // Energy the building started with counts as input.
    const Mask<R> first = started_ == 0.0;
    now.input = select(first, R(now.kinetic + now.elastic), now.input);
    now.damping = select(first, splat<R>(0), now.damping);
    now.absorbed = select(first, splat<R>(0), now.absorbed);
    accept(now, instant.seen);
    remember(instant);
    return every_lane<R>();
  }

  void restart(int lane) noexcept override {
    for (R* one : {&started_, &last_time_, &now_.input, &now_.kinetic, &now_.damping, &now_.absorbed, &now_.elastic,
                   &largest_input_, &largest_imbalance_})
      set_lane(*one, lane, 0.0);
  }

  Energies now(int i = 0) const {
    return {lane(now_.input, i), lane(now_.kinetic, i), lane(now_.damping, i), lane(now_.absorbed, i),
            lane(now_.elastic, i)};
  }
  // Largest |imbalance| / largest input over the march; 0 when nothing was put in.
  double error(int i = 0) const {
    const double input = lane(largest_input_, i);
    return input > 0 ? lane(largest_imbalance_, i) / input : 0;
  }

 private:
  struct Powers {
    R load{}, damping{};              // W, v.p and v.Cv
    R load_slope{}, damping_slope{};  // W/s, of them; the load's own slope enters in add_work
  };

  R dot(const R* x, const R* y) const noexcept {
    R sum = splat<R>(0);
    for (int i = 0; i < system_.freedoms; ++i) sum += x[i] * y[i];
    return sum;
  }

  Powers powers(const InstantOver<R>& instant) const noexcept {
    const R* v = instant.state.v.data();
    return {dot(v, instant.load), dot(v, instant.damping_force), dot(instant.acceleration, instant.load),
            R(2.0 * dot(instant.acceleration, instant.damping_force))};
  }

  void add_work(const InstantOver<R>& instant, EnergiesOver<R>& now) noexcept {
    if (rule_ == WorkRule::corrected) return add_corrected_work(instant, now);
    R input = splat<R>(0), damping = splat<R>(0);
    for (int i = 0; i < system_.freedoms; ++i) {
      const R moved = instant.state.u[i] - last_u_[i];
      input += (last_load_[i] + instant.load[i]) * moved;
      damping += (last_damping_[i] + instant.damping_force[i]) * moved;
    }
    now.input += 0.5 * input;
    now.damping += 0.5 * damping;
  }

  // The load is linear over the step: v.p' differs at its two ends by (v1 - v0).(p1 - p0) / dt.
  void add_corrected_work(const InstantOver<R>& instant, EnergiesOver<R>& now) noexcept {
    const R dt = instant.time - last_time_;
    const Powers at_end = powers(instant);
    R load_rate = splat<R>(0);
    for (int i = 0; i < system_.freedoms; ++i)
      load_rate += (last_v_[i] - instant.state.v[i]) * (instant.load[i] - last_load_[i]);
    const R slopes = last_powers_.load_slope - at_end.load_slope + select(dt > 0.0, R(load_rate / dt), splat<R>(0));
    now.input += 0.5 * dt * (last_powers_.load + at_end.load) + dt * dt / 12.0 * slopes;
    now.damping += 0.5 * dt * (last_powers_.damping + at_end.damping) +
                   dt * dt / 12.0 * (last_powers_.damping_slope - at_end.damping_slope);
  }

  void add_absorbed(const InstantOver<R>& instant, EnergiesOver<R>& now) noexcept {
    for_each_group<R>(system_, last_memory_, instant.state.memory,
                      [&]<class L>(const ElementGroup<L>& group, const auto& before, const auto& after) {
                        if constexpr (!std::is_same_v<L, Linear>)
                          for (std::size_t e = 0; e < group.laws.size(); ++e)
                            now.absorbed += dissipated_energy<R>(group.laws[e], before[e], after[e]);
                      });
  }

  // Kinetic energy, and elastic: half u.Ku (linear springs less P-Delta) and what the laws have stored.
  void read_state(const InstantOver<R>& instant, EnergiesOver<R>& now) noexcept {
    const R *u = instant.state.u.data(), *v = instant.state.v.data();
    R kinetic = splat<R>(0);
    for (int i = 0; i < system_.freedoms; ++i) kinetic += system_.mass[i] * v[i] * v[i];
    now.kinetic = 0.5 * kinetic;
    now.elastic = splat<R>(0);
    if (with_stiffness_) {
      std::fill(scratch_.begin(), scratch_.end(), splat<R>(0));
      band_multiply_add(system_.stiffness, u, scratch_.data());
      now.elastic = 0.5 * dot(u, scratch_.data());
    }
    for_each_group<R>(system_, instant.state.memory, [&]<class L>(const ElementGroup<L>& group, const auto& memory) {
      if constexpr (!std::is_same_v<L, Linear>)
        for (std::size_t e = 0; e < group.laws.size(); ++e)
          now.elastic += stored_energy<R>(group.laws[e], memory[e], instant.deformation[group.id[e]]);
    });
  }

  void accept(const EnergiesOver<R>& now, const Mask<R>& seen) noexcept {
    now_.input = select(seen, now.input, now_.input);
    now_.kinetic = select(seen, now.kinetic, now_.kinetic);
    now_.damping = select(seen, now.damping, now_.damping);
    now_.absorbed = select(seen, now.absorbed, now_.absorbed);
    now_.elastic = select(seen, now.elastic, now_.elastic);
    started_ = select(seen, splat<R>(1), started_);
    largest_input_ = select(seen, lane_max<R>(largest_input_, lane_abs(now.input)), largest_input_);
    largest_imbalance_ = select(seen, lane_max<R>(largest_imbalance_, lane_abs(now.imbalance())), largest_imbalance_);
  }

  void remember(const InstantOver<R>& instant) noexcept {
    if (rule_ == WorkRule::corrected) {
      const Powers now = powers(instant);
      const Mask<R>& seen = instant.seen;
      last_powers_ = {select(seen, now.load, last_powers_.load), select(seen, now.damping, last_powers_.damping),
                      select(seen, now.load_slope, last_powers_.load_slope),
                      select(seen, now.damping_slope, last_powers_.damping_slope)};
      keep(instant.seen, instant.state.v.data(), last_v_);
    }
    last_time_ = select(instant.seen, instant.time, last_time_);
    keep(instant.seen, instant.state.u.data(), last_u_);
    keep(instant.seen, instant.load, last_load_);
    keep(instant.seen, instant.damping_force, last_damping_);
    if (all(instant.seen))
      last_memory_ = instant.state.memory;
    else
      select_memories<R>(instant.seen, instant.state.memory, last_memory_);
  }

  void keep(const Mask<R>& seen, const R* now, std::vector<R>& last) noexcept {
    if (all(seen))
      std::copy_n(now, last.size(), last.begin());
    else
      for (std::size_t i = 0; i < last.size(); ++i) last[i] = select(seen, now[i], last[i]);
  }

  const System& system_;
  WorkRule rule_;
  bool with_stiffness_;
  R started_ = splat<R>(0);  // 1 in lanes that have been seen once
  R last_time_ = splat<R>(0);
  Powers last_powers_;
  std::vector<R> last_u_, last_v_, last_load_, last_damping_, scratch_;
  Memories<R> last_memory_;
  EnergiesOver<R> now_;
  R largest_input_ = splat<R>(0), largest_imbalance_ = splat<R>(0);
};
using EnergyWatch = EnergyWatchOver<double>;

}  // namespace pilotis
