#include "integrators/march.hpp"

#include <algorithm>
#include <cmath>

#include "core/system/kernel.hpp"

namespace pilotis {

namespace {

bool all_finite(const State<double>& state) noexcept {
  double sum = 0;  // a non-finite member makes the sum non-finite
  for (std::size_t i = 0; i < state.u.size(); ++i) sum += std::abs(state.u[i]) + std::abs(state.v[i]);
  return std::isfinite(sum);
}

bool all_finite(const std::vector<double>& before, const std::vector<double>& after) noexcept {
  double sum = 0;
  for (std::size_t i = 0; i < before.size(); ++i) sum += std::abs(before[i]) + std::abs(after[i]);
  return std::isfinite(sum);
}

// Shows accepted states to the observers.
class Gallery {
 public:
  Gallery(const System& system, const Load& load, std::span<Observer* const> observers)
      : load_(load),
        observers_(observers),
        reader_(system),
        values_(reader_.layout().size()),
        forces_(system.freedoms) {}

  bool show(const State<double>& state, double time) noexcept {
    load_.at(time, forces_.data());
    const double ground = load_.ground(time);
    reader_.read(state, forces_.data(), ground, values_.data());
    const Instant instant{time,
                          state.fraction == 0,
                          state,
                          forces_.data(),
                          ground,
                          values_.data(),
                          reader_.acceleration().data(),
                          reader_.damping_force().data()};
    bool go_on = true;
    for (Observer* observer : observers_) go_on = observer->see(instant) && go_on;
    return go_on;
  }

 private:
  const Load& load_;
  std::span<Observer* const> observers_;
  ResponseReader reader_;
  std::vector<double> values_, forces_;
};

// The clock goes on by `share` of a whole step.
void advance_clock(State<double>& state, double share) noexcept {
  state.fraction += share;
  if (state.fraction < 1 - 1e-12) return;
  state.fraction = 0;
  ++state.step;
}

double time_of(const State<double>& state, double dt) noexcept {
  return (static_cast<double>(state.step) + state.fraction) * dt;
}

}  // namespace

void start(const System& system, const Load& load, State<double>& state) {
  std::vector<double> forces(system.freedoms), internal(system.freedoms), tangent(system.elements);
  Memories<double> virgin = state.memory;
  load.at(0, forces.data());
  internal_forces(system, state.u.data(), state.v.data(), virgin, state.memory, internal.data(), tangent.data());
  for (int i = 0; i < system.freedoms; ++i) state.a[i] = (forces[i] - internal[i]) / system.mass[i];
}

MarchEnd march(const System& system, const Load& load, Stepper& stepper, const MarchSpan& span, State<double>& state,
               std::span<Observer* const> observers) {
  Gallery gallery(system, load, observers);
  std::vector<double> before(system.freedoms), after(system.freedoms);
  const double smallest = std::ldexp(1.0, -span.halvings);
  if (state.step == 0 && state.fraction == 0 && !gallery.show(state, 0)) return {MarchEnding::stopped, 0};
  double share = 1;  // of a whole step to try next
  while (state.step < span.end) {
    share = std::min(share, 1 - state.fraction);
    const double time = time_of(state, span.dt);
    load.at(time, before.data());
    load.at(time + share * span.dt, after.data());
    const StepResult result = stepper.step(state, {share * span.dt, before.data(), after.data()});
    if (result.status == StepStatus::retry_smaller && share > smallest) {
      share /= 2;
      continue;
    }
    if (result.status != StepStatus::done)
      return {all_finite(before, after) ? MarchEnding::not_converged : MarchEnding::not_finite, time};
    if (!all_finite(state)) return {MarchEnding::not_finite, time};
    advance_clock(state, result.share * share);
    if (result.share < 1 || state.fraction == 0) share = 1;
    if (!gallery.show(state, time_of(state, span.dt))) return {MarchEnding::stopped, time_of(state, span.dt)};
  }
  return {MarchEnding::done, time_of(state, span.dt)};
}

}  // namespace pilotis
