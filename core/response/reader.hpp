// Reads every quantity of core/response/quantities.hpp off a state. Needs nothing but the state and the load, so a
// scheme cannot colour it: forces are the laws' answers at the state, accelerations follow from equilibrium. Over the
// lane scalar; no allocation in read().
#pragma once

#include <vector>

#include "core/response/quantities.hpp"
#include "core/system/kernel.hpp"

namespace pilotis {

// Where the reader puts what, and what it needs of the system besides: the same for all lanes.
struct ReaderPlan {
  explicit ReaderPlan(const System& system);

  ResponseLayout layout;
  std::size_t floor_displacement, floor_velocity, floor_acceleration, drift, drift_ratio, shear_spring, shear_damping,
      shear, base_shear, overturning, ductility;
  std::vector<double> per_height;  // 1/m, [story]
  std::vector<double> per_yield;   // 1/m, one over the yield deformation, [story]; 0: does not yield
  std::vector<double> per_mass;    // 1/kg, [freedom]
  bool drifts_are_deformations;    // every story's spring deforms by its drift

  // Drift ratio and ductility are multiples of the drift, base shear is a story shear.
  std::vector<Multiple> multiples() const;
};

template <class R>
class ResponseReaderOver {
 public:
  explicit ResponseReaderOver(const System& system)
      : system_(system),
        plan_(system),
        own_(system),
        acceleration_(system.freedoms),
        scratch_(state_at_rest<R>(system).memory) {}

  const ResponseLayout& layout() const { return plan_.layout; }

  // `load` is p - M iota a_g, N, [freedom]; `ground` is a_g, m/s2. `known`, where not null, are the internal forces at
  // this very state, which a scheme has just computed. Writes layout().size() values, SI.
  void read(const State<R>& state, const R* load, const R& ground, R* values, Forces<R>* known = nullptr) noexcept {
    forces_ = known;
    if (forces_ == nullptr) {
      internal_forces(system_, state.u.data(), state.v.data(), state.memory, scratch_, own_);
      forces_ = &own_;
    }
    read_linear_elements(system_, state.u.data(), *forces_);
    read_floors(state, load, ground, values);
    read_stories(state, values);
  }

  // Of the state last read: relative acceleration from equilibrium, m/s2, and all forces.
  const std::vector<R>& acceleration() const { return acceleration_; }
  const Forces<R>& forces() const { return *forces_; }

 private:
  void read_floors(const State<R>& state, const R* load, const R& ground, R* values) noexcept {
    const R* internal = forces_->internal.data();
    for (int i = 0; i < system_.freedoms; ++i) acceleration_[i] = (load[i] - internal[i]) * plan_.per_mass[i];
    for (std::size_t i = 0; i < system_.stories.floor.size(); ++i) {
      const int freedom = system_.stories.floor[i];
      values[plan_.floor_displacement + i] = state.u[freedom];
      values[plan_.floor_velocity + i] = state.v[freedom];
      values[plan_.floor_acceleration + i] = acceleration_[freedom] + system_.influence[freedom] * ground;
    }
  }

  void read_stories(const State<R>& state, R* values) const noexcept {
    const StoryGauges& stories = system_.stories;
    R damping_above = splat<R>(0), moment_above = splat<R>(0);
    for (std::size_t i = stories.height.size(); i-- > 0;) {
      const R drift = plan_.drifts_are_deformations ? forces_->deformation[stories.spring[i]]
                                                    : row_value(system_.rows, stories.drift_row[i], state.u.data());
      const R spring = forces_->element[stories.spring[i]];
      damping_above += forces_->damping[stories.floor[i]];
      const R shear = spring + damping_above;
      moment_above += shear * stories.height[i];
      values[plan_.drift + i] = drift;
      values[plan_.drift_ratio + i] = drift * plan_.per_height[i];
      values[plan_.shear_spring + i] = spring;
      values[plan_.shear_damping + i] = damping_above;
      values[plan_.shear + i] = shear;
      values[plan_.overturning + i] = moment_above;
      values[plan_.ductility + i] = drift * plan_.per_yield[i];
    }
    values[plan_.base_shear] = values[plan_.shear];
  }

  const System& system_;
  ReaderPlan plan_;
  Forces<R> own_;
  Forces<R>* forces_ = &own_;
  std::vector<R> acceleration_;
  Memories<R> scratch_;
};
using ResponseReader = ResponseReaderOver<double>;

}  // namespace pilotis
