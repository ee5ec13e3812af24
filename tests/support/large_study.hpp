// Any number of invented runs of invented buildings, made one shard at a time, by formula: no march.
#pragma once

#include <vector>

#include "io/results/study_header.hpp"

namespace pilotis::invented {

// What a study of many runs is made of. Buildings have 4, 7, 10, ... stories, or all `stories` where it is not 0.
struct Size {
  int buildings = 1, factors = 1, motions = 1;
  int stories = 0;
  std::size_t runs() const { return static_cast<std::size_t>(buildings) * factors * motions; }
};

StudyHeader large_header(const Size& size);  // with one limit: mean drift ratio at most 1 %

// Runs first, first + 1, ...: run ((building * factors + factor) * motions + motion). Every 50th collapses, every 77th
// does not converge. With `instants` > 0 all keep drift and base_shear at so many instants.
std::vector<RunResult> large_runs(const Size& size, std::size_t first, std::size_t count, int instants = 0);

}  // namespace pilotis::invented
