// Sticks for the tests of the equations of motion.
#pragma once

#include <algorithm>
#include <random>
#include <vector>

#include "core/building/stick.hpp"

namespace pilotis::test {

inline Story linear_story(double mass, double stiffness, double height = 3.0, double dashpot = 0.0) {
  return {"", height, mass, Linear{stiffness}, dashpot};
}

// Counted from the ground up: kg, N/m.
inline Stick linear_stick(const std::vector<double>& masses, const std::vector<double>& stiffnesses,
                          double height = 3.0) {
  Stick stick;
  for (std::size_t i = 0; i < masses.size(); ++i)
    stick.stories.push_back(linear_story(masses[i], stiffnesses[i], height));
  return stick;
}

// Linear and bilinear stories in turn at random, masses and stiffnesses over a factor of ten, light dashpots.
inline Stick random_stick(int stories, std::mt19937& dice) {
  std::uniform_real_distribution<double> mass(1e4, 1e5), stiffness(2e7, 2e8), dashpot(0, 1e5);
  Stick stick;
  for (int i = 0; i < stories; ++i) {
    Story story = linear_story(mass(dice), stiffness(dice), 3.5, dashpot(dice));
    if (dice() % 2 == 0) story.spring = Bilinear{stiffness(dice), 1e6, 0.05};
    stick.stories.push_back(story);
  }
  return stick;
}

}  // namespace pilotis::test
