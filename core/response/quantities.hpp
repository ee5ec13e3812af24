// What a run reports. Listed once; peaks, histories, limits, the result file and the tables iterate this list.
#pragma once

#include <optional>
#include <span>
#include <string>
#include <string_view>

#include "core/units/units.hpp"

namespace pilotis {

enum class Per { story, floor, run };  // what a quantity has one value for

struct Quantity {
  std::string_view name;
  Per per;
  Dimension dimension;
  std::string_view long_name;  // one line, with the sign convention where it matters
};

// Order is that of the flat response vector. Floors are floors 1..n, stories 1..n.
//   floor_displacement, floor_velocity      relative to the ground
//   floor_acceleration                      absolute
//   drift, drift_ratio
//   story_shear_spring                      what the story's spring carries
//   story_shear_damping                     the damping forces C u' on the floors above the cut, summed: c_i drift' for
//   story
//                                           dashpots and stiffness-proportional damping; mass-proportional and modal
//                                           damping are carried down the same way
//   story_shear                             the sum of both: in balance with the inertia and the floor forces above
//   base_shear                              story_shear of story 1
//   overturning_moment                      at the foot of each story: sum of story_shear times height of it and those
//   above ductility                               drift / yield deformation, signed; 0 where the law does not yield
std::span<const Quantity> quantities();

// nullptr when there is none of that name.
const Quantity* find_quantity(std::string_view name);

// Where each quantity stands in a flat vector of all values of one instant of an n-story building.
class ResponseLayout {
 public:
  explicit ResponseLayout(int stories);
  int stories() const { return stories_; }
  std::size_t size() const { return size_; }           // of the flat vector
  std::size_t offset(const Quantity& quantity) const;  // of its first value
  std::size_t count(const Quantity& quantity) const;   // stories, floors or 1
 private:
  int stories_;
  std::size_t size_;
};

// A value of the flat vector that is another one times a constant: its peak needs no watching of its own.
struct Multiple {
  std::size_t value = 0, of = 0;
  double by = 0;  // >= 0
};

}  // namespace pilotis
