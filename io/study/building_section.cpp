#include <fmt/format.h>

#include <array>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

constexpr Parameter gravity{"gravity", Dimension::acceleration, "gravity", standard_gravity, 0.0, 1e300, false};
constexpr Parameter height{"height", Dimension::length, "the height of a story", {}, 0.0, 1e300, false};
constexpr Parameter weight{"weight", Dimension::force, "the weight of a floor", {}, 0.0, 1e300, false};
constexpr Parameter mass{"mass", Dimension::mass, "the mass of a floor", {}, 0.0, 1e300, false};
constexpr Parameter dashpot{"dashpot", Dimension::dashpot, "the coefficient of the story's dashpot", 0.0, 0.0};

constexpr std::array<std::string_view, 3> kinds{"stick", "frame", "plan"};
constexpr double most_repeats = 1000;

TableReader building_table(const TableReader& root) {
  TableReader table(root.at("building", "a [building] table is needed"));
  table.known_keys({"kind", "damping", "p_delta", "gravity"});
  const ValueReader kind = table.at("kind", "name the kind of building: stick");
  if (kind.choice("kind of building", kinds) != "stick")
    throw kind.wrong(fmt::format("a building of kind \"{}\" cannot be built yet", kind.text()), "allowed: stick");
  return table;
}

double floor_mass(const TableReader& table, double gravity_value) {
  const auto given_weight = table.quantity_if_given(weight);
  const auto given_mass = table.quantity_if_given(mass);
  if (given_weight && given_mass)
    throw table.at("mass", "").wrong("found both weight and mass of one floor", "give exactly one of the two");
  if (!given_weight && !given_mass)
    throw table.wrong("the floor on top of this story has neither weight nor mass", "give exactly one of the two");
  return given_mass ? *given_mass : *given_weight / gravity_value;
}

// Appends the story, as often as it says.
void add_stories(TableReader table, double gravity_value, std::vector<Story>& stories) {
  table.known_keys({"label", "height", "weight", "mass", "spring", "dashpot", "repeat"});
  Story story;
  story.label = table.text_or("label", "");
  story.height = table.quantity(height);
  story.mass = floor_mass(table, gravity_value);
  story.spring =
      read_spring(table.at("spring", "give the spring of the story, such as { law = \"linear\", stiffness = 2e5 }"));
  story.dashpot = table.quantity(dashpot);
  const double repeat =
      table.quantity(whole_number("repeat", "how many equal stories stand on each other", 1, most_repeats, 1.0));
  stories.insert(stories.end(), static_cast<std::size_t>(repeat), story);
}

}  // namespace

Stick read_building(const TableReader& root) {
  const TableReader table = building_table(root);
  Stick stick;
  stick.gravity = table.quantity(gravity);
  stick.p_delta = table.flag_or("p_delta", false);
  const ValueReader story_value = root.at("story", "a stick needs at least one [[story]] table");
  for (const TableReader& story : root.tables("story")) add_stories(story, stick.gravity, stick.stories);
  if (stick.stories.empty()) throw story_value.wrong("found no story", "a stick needs at least one [[story]] table");
  const ValueReader damping = table.at("damping", "state the damping, or say { kind = \"none\" }");
  stick.damping = read_damping(damping, static_cast<int>(stick.stories.size()));
  validate(stick, story_value.source().file);
  return stick;
}

}  // namespace pilotis
