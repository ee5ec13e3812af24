#include "core/response/reader.hpp"

namespace pilotis {

ReaderPlan::ReaderPlan(const System& system) : layout(static_cast<int>(system.stories.height.size())) {
  const auto offset = [&](const char* name) { return layout.offset(*find_quantity(name)); };
  floor_displacement = offset("floor_displacement");
  floor_velocity = offset("floor_velocity");
  floor_acceleration = offset("floor_acceleration");
  drift = offset("drift");
  drift_ratio = offset("drift_ratio");
  shear_spring = offset("story_shear_spring");
  shear_damping = offset("story_shear_damping");
  shear = offset("story_shear");
  base_shear = offset("base_shear");
  overturning = offset("overturning_moment");
  ductility = offset("ductility");
  std::vector<double> yields(system.elements);
  for_each_group(system, [&](const auto& group) {
    for (std::size_t e = 0; e < group.laws.size(); ++e) yields[group.id[e]] = yield_deformation(group.laws[e]);
  });
  std::vector<int> rows(system.elements);
  for_each_group(system, [&](const auto& group) {
    for (std::size_t e = 0; e < group.laws.size(); ++e) rows[group.id[e]] = group.row[e];
  });
  drifts_are_deformations = true;
  for (std::size_t i = 0; i < system.stories.spring.size(); ++i)
    if (rows[system.stories.spring[i]] != system.stories.drift_row[i]) drifts_are_deformations = false;
  for (double height : system.stories.height) per_height.push_back(1 / height);
  for (int spring : system.stories.spring) per_yield.push_back(yields[spring] > 0 ? 1 / yields[spring] : 0);
  for (double mass : system.mass) per_mass.push_back(1 / mass);
}

std::vector<Multiple> ReaderPlan::multiples() const {
  std::vector<Multiple> found{{base_shear, shear, 1}};
  for (std::size_t i = 0; i < per_height.size(); ++i) {
    found.push_back({drift_ratio + i, drift + i, per_height[i]});
    found.push_back({ductility + i, drift + i, per_yield[i]});
  }
  return found;
}

}  // namespace pilotis
