// The right-hand side over time: p(t) - M iota a_g(t).
#pragma once

#include <vector>

#include "core/motion/accelerogram.hpp"
#include "core/motion/floor_force.hpp"
#include "core/system/system.hpp"

namespace pilotis {

// Keeps its own copies; immutable once made. Linear between the samples of the record and of the tables.
class Load {
 public:
  // `ground` may be null; its samples are multiplied by `factor`. Floors of `forces` are floors of the system.
  Load(const System& system, const Accelerogram* ground, double factor, const std::vector<FloorForce>& forces);

  // Ground acceleration at t, m/s2; zero before the first sample's ramp and from one step after the last.
  double ground(double t) const noexcept;
  // p(t) - M iota a_g(t), N, [freedom].
  void at(double t, double* out) const noexcept;

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
  std::vector<double> samples_;  // m/s2, with the factor, a zero before and after
  double step_ = 0, first_ = 0;  // of samples_
  std::vector<double> minus_mass_influence_;
  std::vector<FreedomForce> forces_;
  double end_ = 0, largest_ = 0;
};

}  // namespace pilotis
