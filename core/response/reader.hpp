// Reads every quantity of core/response/quantities.hpp off a state. Needs nothing but the state and the load, so a
// scheme cannot colour it: forces are the laws' answers at the state, accelerations follow from equilibrium.
#pragma once

#include <vector>

#include "core/response/quantities.hpp"
#include "core/system/state.hpp"

namespace pilotis {

class ResponseReader {
 public:
  explicit ResponseReader(const System& system);

  const ResponseLayout& layout() const { return layout_; }

  // `load` is p - M iota a_g, N, [freedom]; `ground` is a_g, m/s2. Writes layout().size() values, SI.
  void read(const State<double>& state, const double* load, double ground, double* values) noexcept;

  // Of the state last read: relative acceleration from equilibrium, m/s2, and damping forces C v, N; [freedom].
  const std::vector<double>& acceleration() const { return acceleration_; }
  const std::vector<double>& damping_force() const { return damping_force_; }

 private:
  void read_forces(const State<double>& state, const double* load) noexcept;
  void read_floors(const State<double>& state, double ground, double* values) const noexcept;
  void read_stories(const State<double>& state, double* values) const noexcept;

  struct Offsets {
    std::size_t floor_displacement, floor_velocity, floor_acceleration, drift, drift_ratio, shear_spring, shear_damping,
        shear, base_shear, overturning, ductility;
  };

  const System& system_;
  ResponseLayout layout_;
  Offsets at_;
  std::vector<double> yield_deformation_;  // m, [story]; 0: does not yield
  std::vector<double> element_force_;      // N, [element]
  std::vector<double> damping_force_, internal_, acceleration_;
  Memories<double> scratch_;
};

}  // namespace pilotis
