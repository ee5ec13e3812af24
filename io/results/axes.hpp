// What the groups of responses share: their scales and how a quantity lies over them.
#pragma once

#include <string>

#include "core/response/quantities.hpp"
#include "io/results/group_writer.hpp"

namespace pilotis {

// Scales story and floor, 1..count.
inline void write_places(GroupWriter& group, std::size_t count) {
  group.count_scale("story", 1, count, "story, counted from the ground up");
  group.count_scale("floor", 1, count, "floor, counted from the ground up; floor 0 is the ground");
}

// `first` and the quantity's own axis, if it has one.
inline GroupWriter::Axes axes_of(const std::string& first, const Quantity& quantity) {
  if (quantity.per == Per::run) return {first};
  return {first, quantity.per == Per::story ? "story" : "floor"};
}

}  // namespace pilotis
