#include "core/system/load.hpp"

#include <algorithm>
#include <cmath>

namespace pilotis {

// A grid time n dt may miss the ends of the table by rounding; a whole step must not lose its load for that.
double Load::table_value(const FreedomForce& force, double t) noexcept {
  const auto& [freedom, times, values] = force;
  const double rounding = 1e-11 * std::max(1.0, t);
  if (times.empty() || t < times.front() - rounding || t > times.back() + rounding) return 0;
  t = std::clamp(t, times.front(), times.back());
  const auto next = std::upper_bound(times.begin(), times.end(), t);
  if (next == times.end()) return values.back();
  const std::size_t i = next - times.begin();
  const double share = (t - times[i - 1]) / (times[i] - times[i - 1]);
  return values[i - 1] + share * (values[i] - values[i - 1]);
}

Load::Load(const System& system, const Accelerogram* ground, double factor, const std::vector<FloorForce>& forces) {
  for (int i = 0; i < system.freedoms; ++i) minus_mass_influence_.push_back(-system.mass[i] * system.influence[i]);
  const double heaviest = -*std::min_element(minus_mass_influence_.begin(), minus_mass_influence_.end());
  if (ground != nullptr) {
    ground_ = ground;
    factor_ = factor;
    step_ = ground->step;
    leading_zeros_ = ground->first_sample_at > 0 ? 1 : 0;
    count_ = leading_zeros_ + ground->samples.size() + 1;
    first_ = ground->first_sample_at - static_cast<double>(leading_zeros_) * step_;
    end_ = first_ + step_ * static_cast<double>(count_ - 1);
    for (double a : ground->samples) largest_ = std::max(largest_, heaviest * std::abs(factor * a));
  }
  for (const FloorForce& force : forces) {
    forces_.push_back({system.stories.floor[force.floor - 1], force.times, force.forces});
    if (!force.times.empty()) end_ = std::max(end_, force.times.back());
    for (double p : force.forces) largest_ = std::max(largest_, std::abs(p));
  }
}

double Load::ground(double t) const noexcept {
  if (count_ == 0) return 0;
  // A grid time n dt may fall short of its sample by rounding: a billionth of a step forgives it.
  const double x = std::max(0.0, (t - first_) / step_);
  const auto i = static_cast<std::size_t>(x + 1e-9);
  if (i + 1 >= count_) return 0;
  const double share = std::max(0.0, x - static_cast<double>(i));
  const double here = sample(i);
  return here + share * (sample(i + 1) - here);
}

void Load::at(double t, double* out) const noexcept {
  const double acceleration = ground(t);
  for (std::size_t i = 0; i < minus_mass_influence_.size(); ++i) out[i] = minus_mass_influence_[i] * acceleration;
  add_floor_forces(t, out, 0);
}

}  // namespace pilotis
