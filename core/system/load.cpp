#include "core/system/load.hpp"

#include <algorithm>
#include <cmath>

namespace pilotis {

namespace {

// A grid time n dt may miss the ends of the table by rounding; a whole step must not lose its load for that.
double table_value(const std::vector<double>& times, const std::vector<double>& values, double t) {
  const double rounding = 1e-11 * std::max(1.0, t);
  if (times.empty() || t < times.front() - rounding || t > times.back() + rounding) return 0;
  t = std::clamp(t, times.front(), times.back());
  const auto next = std::upper_bound(times.begin(), times.end(), t);
  if (next == times.end()) return values.back();
  const std::size_t i = next - times.begin();
  const double share = (t - times[i - 1]) / (times[i] - times[i - 1]);
  return values[i - 1] + share * (values[i] - values[i - 1]);
}

}  // namespace

Load::Load(const System& system, const Accelerogram* ground, double factor, const std::vector<FloorForce>& forces) {
  for (int i = 0; i < system.freedoms; ++i) minus_mass_influence_.push_back(-system.mass[i] * system.influence[i]);
  const double heaviest = -*std::min_element(minus_mass_influence_.begin(), minus_mass_influence_.end());
  if (ground != nullptr) {
    step_ = ground->step;
    first_ = ground->first_sample_at;
    for (double a : ground->samples) samples_.push_back(factor * a);
    samples_.push_back(0.0);  // the ground comes to rest one step after the last sample
    if (first_ > 0) {         // and starts from rest one step before a first sample that is not at t = 0
      samples_.insert(samples_.begin(), 0.0);
      first_ -= step_;
    }
    end_ = first_ + step_ * static_cast<double>(samples_.size() - 1);
    for (double a : samples_) largest_ = std::max(largest_, heaviest * std::abs(a));
  }
  for (const FloorForce& force : forces) {
    forces_.push_back({system.stories.floor[force.floor - 1], force.times, force.forces});
    if (!force.times.empty()) end_ = std::max(end_, force.times.back());
    for (double p : force.forces) largest_ = std::max(largest_, std::abs(p));
  }
}

double Load::ground(double t) const noexcept {
  if (samples_.empty()) return 0;
  // A grid time n dt may fall short of its sample by rounding: a billionth of a step forgives it.
  const double x = std::max(0.0, (t - first_) / step_);
  const auto i = static_cast<std::size_t>(x + 1e-9);
  if (i + 1 >= samples_.size()) return 0;
  const double share = std::max(0.0, x - static_cast<double>(i));
  return samples_[i] + share * (samples_[i + 1] - samples_[i]);
}

void Load::at(double t, double* out) const noexcept {
  const double acceleration = ground(t);
  for (std::size_t i = 0; i < minus_mass_influence_.size(); ++i) out[i] = minus_mass_influence_[i] * acceleration;
  for (const FreedomForce& force : forces_) out[force.freedom] += table_value(force.times, force.forces, t);
}

}  // namespace pilotis
