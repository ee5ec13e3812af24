// The right-hand side over time: p(t) - M iota a_g(t).
#pragma once

#include <vector>

#include "core/motion/accelerogram.hpp"
#include "core/motion/floor_force.hpp"
#include "core/system/system.hpp"

namespace pilotis {

// Refers to the record, which must outlive it; immutable once made. Linear between the samples of the record and of the
// tables.
class Load {
 public:
  // `ground` may be null; its samples are multiplied by `factor`. Floors of `forces` are floors of the system.
  Load(const System& system, const Accelerogram* ground, double factor, const std::vector<FloorForce>& forces);

  // Ground acceleration at t, m/s2; zero before the first sample's ramp and from one step after the last.
  double ground(double t) const noexcept;
  // p(t) - M iota a_g(t), N, [freedom].
  void at(double t, double* out) const noexcept;
  // Adds p(t), N, to one lane of out, [freedom].
  template <class R>
  void add_floor_forces(double t, R* out, int i) const noexcept {
    for (const FreedomForce& force : forces_)
      set_lane(out[force.freedom], i, lane(out[force.freedom], i) + table_value(force, t));
  }
  bool has_floor_forces() const { return !forces_.empty(); }
  // -M iota, kg, [freedom].
  const std::vector<double>& minus_mass_influence() const { return minus_mass_influence_; }

  // s, when ground and forces have come to rest for good.
  double end() const { return end_; }
  // N, the largest magnitude that the ground alone or one floor force alone puts on a freedom: the scale of the
  // equilibrium check.
  double largest() const { return largest_; }

 private:
  struct FreedomForce {
    int freedom;
    std::vector<double> times, forces;
  };
  static double table_value(const FreedomForce& force, double t) noexcept;
  // The ground comes to rest one step after the last sample, and starts from rest one step before a first sample that
  // is not at t = 0: sample i counts with those zeros.
  double sample(std::size_t i) const noexcept {
    const std::size_t k = i - leading_zeros_;  // wraps for the zero before
    return k < ground_->samples.size() ? factor_ * ground_->samples[k] : 0.0;
  }

  const Accelerogram* ground_ = nullptr;
  double factor_ = 1;
  std::size_t leading_zeros_ = 0, count_ = 0;  // of the samples, zeros included
  double step_ = 0, first_ = 0;                // s, of them
  std::vector<double> minus_mass_influence_;   // kg, [freedom]
  std::vector<FreedomForce> forces_;
  double end_ = 0, largest_ = 0;
};

}  // namespace pilotis
