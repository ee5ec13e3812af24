#include "core/system/assemble_stick.hpp"

#include "core/system/damping.hpp"

namespace pilotis {

namespace {

// matrix += value [1 -1; -1 1] between the freedoms of one story.
void add_story_pair(Band& matrix, int story, double value) {
  matrix.add(story, story, value);
  if (story == 0) return;
  matrix.add(story - 1, story - 1, value);
  matrix.add(story, story - 1, -value);
}

int add_drift_row(Rows& rows, int story) {
  return story == 0 ? rows.add({0}, {1.0}) : rows.add({story, story - 1}, {1.0, -1.0});
}

void add_story(const Story& story, int i, System& system) {
  const int row = add_drift_row(system.rows, i);
  system.stories.height.push_back(story.height);
  system.stories.floor.push_back(i);
  system.stories.drift_row.push_back(row);
  system.stories.spring.push_back(add_element(system, story.spring, row));
  add_story_pair(system.damping, i, story.dashpot);
}

// Geometric stiffness of a straight string of weights: -P/h per story, P the weight above. Common practice; Clough &
// Penzien, Dynamics of Structures, ch. 10 (linear geometric stiffness).
void add_p_delta(const Stick& stick, System& system) {
  double weight_above = 0;
  for (int i = system.freedoms - 1; i >= 0; --i) {
    weight_above += stick.gravity * stick.stories[i].mass;
    add_story_pair(system.stiffness, i, -weight_above / stick.stories[i].height);
  }
}

}  // namespace

System assemble(const Stick& stick) {
  System system;
  system.freedoms = static_cast<int>(stick.stories.size());
  system.half = system.freedoms > 1 ? 1 : 0;
  system.stiffness = system.damping = Band(system.freedoms, system.half);
  system.influence.assign(system.freedoms, 1.0);
  for (const Story& story : stick.stories) system.mass.push_back(story.mass);
  for (int i = 0; i < system.freedoms; ++i) add_story(stick.stories[i], i, system);
  prepare_scatter(system);
  const Band elastic = initial_stiffness(system);
  if (stick.p_delta) add_p_delta(stick, system);
  add_damping(stick.damping, elastic, system);
  return system;
}

}  // namespace pilotis
