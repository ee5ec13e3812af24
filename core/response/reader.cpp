#include "core/response/reader.hpp"

#include <type_traits>

#include "core/system/kernel.hpp"

namespace pilotis {

ResponseReader::ResponseReader(const System& system)
    : system_(system),
      layout_(static_cast<int>(system.stories.height.size())),
      yield_deformation_(system.stories.height.size()),
      element_force_(system.elements),
      damping_force_(system.freedoms),
      internal_(system.freedoms),
      acceleration_(system.freedoms),
      scratch_(state_at_rest<double>(system).memory) {
  const auto offset = [&](const char* name) { return layout_.offset(*find_quantity(name)); };
  at_ = {offset("floor_displacement"),
         offset("floor_velocity"),
         offset("floor_acceleration"),
         offset("drift"),
         offset("drift_ratio"),
         offset("story_shear_spring"),
         offset("story_shear_damping"),
         offset("story_shear"),
         offset("base_shear"),
         offset("overturning_moment"),
         offset("ductility")};
  std::vector<double> yields(system.elements);
  for_each_group(system, [&](const auto& group) {
    for (std::size_t e = 0; e < group.laws.size(); ++e) yields[group.id[e]] = yield_deformation(group.laws[e]);
  });
  for (std::size_t i = 0; i < yield_deformation_.size(); ++i) yield_deformation_[i] = yields[system.stories.spring[i]];
}

void ResponseReader::read(const State<double>& state, const double* load, double ground, double* values) noexcept {
  read_forces(state, load);
  read_floors(state, ground, values);
  read_stories(state, values);
}

void ResponseReader::read_forces(const State<double>& state, const double* load) noexcept {
  damping_force_.assign(damping_force_.size(), 0.0);
  add_damping_forces(system_, state.v.data(), damping_force_.data());
  internal_ = damping_force_;
  band_multiply_add(system_.stiffness, state.u.data(), internal_.data());
  for_each_group<double>(system_, state.memory, scratch_,
                         [&]<class L>(const ElementGroup<L>& group, const auto& memory, auto& trial) {
                           for (std::size_t e = 0; e < group.laws.size(); ++e) {
                             const double deformation = row_value(system_.rows, group.row[e], state.u.data());
                             const double rate = row_value(system_.rows, group.row[e], state.v.data());
                             const double force = reply(group.laws[e], deformation, rate, memory[e], trial[e]).force;
                             element_force_[group.id[e]] = force;
                             if constexpr (!std::is_same_v<L, Linear>)
                               add_row_force(system_.rows, group.row[e], force, internal_.data());
                           }
                         });
  for (int i = 0; i < system_.freedoms; ++i) acceleration_[i] = (load[i] - internal_[i]) / system_.mass[i];
}

void ResponseReader::read_floors(const State<double>& state, double ground, double* values) const noexcept {
  for (std::size_t i = 0; i < system_.stories.floor.size(); ++i) {
    const int freedom = system_.stories.floor[i];
    values[at_.floor_displacement + i] = state.u[freedom];
    values[at_.floor_velocity + i] = state.v[freedom];
    values[at_.floor_acceleration + i] = acceleration_[freedom] + system_.influence[freedom] * ground;
  }
}

void ResponseReader::read_stories(const State<double>& state, double* values) const noexcept {
  const StoryGauges& stories = system_.stories;
  double damping_above = 0, moment_above = 0;
  for (std::size_t i = stories.height.size(); i-- > 0;) {
    const double drift = row_value(system_.rows, stories.drift_row[i], state.u.data());
    const double spring = element_force_[stories.spring[i]];
    damping_above += damping_force_[stories.floor[i]];
    const double shear = spring + damping_above;
    moment_above += shear * stories.height[i];
    values[at_.drift + i] = drift;
    values[at_.drift_ratio + i] = drift / stories.height[i];
    values[at_.shear_spring + i] = spring;
    values[at_.shear_damping + i] = damping_above;
    values[at_.shear + i] = shear;
    values[at_.overturning + i] = moment_above;
    values[at_.ductility + i] = yield_deformation_[i] > 0 ? drift / yield_deformation_[i] : 0.0;
  }
  values[at_.base_shear] = values[at_.shear];
}

}  // namespace pilotis
