#include "core/response/energy.hpp"

#include <algorithm>
#include <cmath>
#include <numeric>

#include "core/system/kernel.hpp"

namespace pilotis {

namespace {

double dot(const double* x, const double* y, int n) { return std::inner_product(x, x + n, y, 0.0); }

}  // namespace

EnergyWatch::EnergyWatch(const System& system, WorkRule rule)
    : system_(system), rule_(rule), last_memory_(state_at_rest<double>(system).memory) {
  last_u_.assign(system.freedoms, 0.0);
  last_v_ = last_load_ = last_damping_ = scratch_ = last_u_;
}

bool EnergyWatch::see(const Instant& instant) noexcept {
  if (started_) {
    add_work(instant);
    add_absorbed(instant);
  }
  read_state(instant);
  if (!started_) now_.input = now_.kinetic + now_.elastic;
  started_ = true;
  largest_input_ = std::max(largest_input_, std::abs(now_.input));
  largest_imbalance_ = std::max(largest_imbalance_, std::abs(now_.imbalance()));
  remember(instant);
  return true;
}

double EnergyWatch::error() const { return largest_input_ > 0 ? largest_imbalance_ / largest_input_ : 0; }

EnergyWatch::Powers EnergyWatch::powers(const Instant& instant) noexcept {
  const int n = system_.freedoms;
  const double* v = instant.state.v.data();
  Powers p;
  p.load = dot(v, instant.load, n);
  p.damping = dot(v, instant.damping_force, n);
  p.load_slope = dot(instant.acceleration, instant.load, n);
  p.damping_slope = 2 * dot(instant.acceleration, instant.damping_force, n);
  return p;
}

void EnergyWatch::add_work(const Instant& instant) noexcept {
  const int n = system_.freedoms;
  const double dt = instant.time - last_time_;
  if (rule_ == WorkRule::trapezoid) {
    for (int i = 0; i < n; ++i) {
      const double moved = instant.state.u[i] - last_u_[i];
      now_.input += 0.5 * (last_load_[i] + instant.load[i]) * moved;
      now_.damping += 0.5 * (last_damping_[i] + instant.damping_force[i]) * moved;
    }
    return;
  }
  const Powers now = powers(instant);
  // The load is linear over the step: v.p' differs at its two ends by (v1 - v0).(p1 - p0) / dt.
  double load_rate = 0;
  for (int i = 0; i < n; ++i) load_rate += (last_v_[i] - instant.state.v[i]) * (instant.load[i] - last_load_[i]);
  const double input_slopes = last_powers_.load_slope - now.load_slope + (dt > 0 ? load_rate / dt : 0);
  now_.input += 0.5 * dt * (last_powers_.load + now.load) + dt * dt / 12 * input_slopes;
  now_.damping +=
      0.5 * dt * (last_powers_.damping + now.damping) + dt * dt / 12 * (last_powers_.damping_slope - now.damping_slope);
}

void EnergyWatch::add_absorbed(const Instant& instant) noexcept {
  for_each_group<double>(system_, last_memory_, instant.state.memory,
                         [&](const auto& group, const auto& before, const auto& after) {
                           for (std::size_t e = 0; e < group.laws.size(); ++e)
                             now_.absorbed += dissipated_energy(group.laws[e], before[e], after[e]);
                         });
}

// Kinetic energy, and elastic: half u.Ku (linear springs less P-Delta) and what the laws have stored.
void EnergyWatch::read_state(const Instant& instant) noexcept {
  const int n = system_.freedoms;
  const double *u = instant.state.u.data(), *v = instant.state.v.data();
  now_.kinetic = 0;
  for (int i = 0; i < n; ++i) now_.kinetic += 0.5 * system_.mass[i] * v[i] * v[i];
  std::fill(scratch_.begin(), scratch_.end(), 0.0);
  band_multiply_add(system_.stiffness, u, scratch_.data());
  now_.elastic = 0.5 * dot(u, scratch_.data(), n);
  for_each_group<double>(system_, instant.state.memory, [&]<class L>(const ElementGroup<L>& group, const auto& memory) {
    if constexpr (!std::is_same_v<L, Linear>)
      for (std::size_t e = 0; e < group.laws.size(); ++e)
        now_.elastic += stored_energy<double>(group.laws[e], memory[e], row_value(system_.rows, group.row[e], u));
  });
}

void EnergyWatch::remember(const Instant& instant) noexcept {
  if (rule_ == WorkRule::corrected) last_powers_ = powers(instant);
  last_time_ = instant.time;
  last_u_ = instant.state.u;
  last_v_ = instant.state.v;
  std::copy_n(instant.load, system_.freedoms, last_load_.begin());
  std::copy_n(instant.damping_force, system_.freedoms, last_damping_.begin());
  last_memory_ = instant.state.memory;
}

}  // namespace pilotis
