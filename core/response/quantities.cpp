#include "core/response/quantities.hpp"

#include <array>

namespace pilotis {

namespace {

constexpr std::array list{
    Quantity{"floor_displacement", Per::floor, Dimension::length,
             "floor displacement relative to the ground, positive to the right"},
    Quantity{"floor_velocity", Per::floor, Dimension::velocity,
             "floor velocity relative to the ground, positive to the right"},
    Quantity{"floor_acceleration", Per::floor, Dimension::acceleration,
             "absolute floor acceleration, positive to the right"},
    Quantity{"drift", Per::story, Dimension::length, "interstory drift, positive when the upper floor is to the right"},
    Quantity{"drift_ratio", Per::story, Dimension::none, "interstory drift over story height"},
    Quantity{"story_shear_spring", Per::story, Dimension::force,
             "spring part of the story shear, positive with positive drift"},
    Quantity{"story_shear_damping", Per::story, Dimension::force,
             "damping part of the story shear: damping forces of the floors above, summed"},
    Quantity{"story_shear", Per::story, Dimension::force, "story shear, spring part and damping part together"},
    Quantity{"base_shear", Per::run, Dimension::force, "story shear of story 1"},
    Quantity{"overturning_moment", Per::story, Dimension::moment,
             "overturning moment at the foot of the story, from the story shears of it and above"},
    Quantity{"ductility", Per::story, Dimension::none,
             "drift over yield deformation of the story's spring; 0 where it does not yield"}};

std::size_t values_of(Per per, int stories) { return per == Per::run ? 1 : static_cast<std::size_t>(stories); }

}  // namespace

std::span<const Quantity> quantities() { return list; }

const Quantity* find_quantity(std::string_view name) {
  for (const Quantity& quantity : list)
    if (quantity.name == name) return &quantity;
  return nullptr;
}

ResponseLayout::ResponseLayout(int stories) : stories_(stories), size_(0) {
  for (const Quantity& quantity : list) size_ += count(quantity);
}

std::size_t ResponseLayout::count(const Quantity& quantity) const { return values_of(quantity.per, stories_); }

std::size_t ResponseLayout::offset(const Quantity& quantity) const {
  std::size_t at = 0;
  for (const Quantity& other : list) {
    if (&other == &quantity) break;
    at += count(other);
  }
  return at;
}

}  // namespace pilotis
