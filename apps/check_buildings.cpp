// What `check` tells of buildings on the screen.
#include <fmt/format.h>
#include <fmt/ranges.h>

#include "apps/buildings.hpp"
#include "apps/check_show.hpp"
#include "apps/text_table.hpp"
#include "apps/units_text.hpp"
#include "core/laws/law_values.hpp"

namespace pilotis {

namespace {

using Align = TextTable::Align;

std::string law_text(const Law& law, const StudyUnits& units) {
  const Method& method = law_method(law);
  const std::vector<double> values = law_values(law);
  std::vector<std::string> parts;
  for (std::size_t i = 0; i < values.size(); ++i)
    parts.push_back(
        fmt::format("{} {}", method.parameters[i].key, with_unit(values[i], method.parameters[i].dimension, units)));
  return fmt::format("{}: {}", method.name, fmt::join(parts, ", "));
}

std::string stories_table(const Stick& stick, const StudyUnits& units) {
  TextTable table({{"story"},
                   {"label", Align::left},
                   {titled("height", Dimension::length, units)},
                   {titled("floor weight", Dimension::force, units)},
                   {titled("floor mass", Dimension::mass, units)},
                   {titled("dashpot", Dimension::dashpot, units)},
                   {"spring", Align::left}});
  for (std::size_t i = 0; i < stick.stories.size(); ++i) {
    const Story& story = stick.stories[i];
    table.add_row({fmt::format("{}", i + 1), story.label, in_units(story.height, Dimension::length, units),
                   in_units(story.mass * stick.gravity, Dimension::force, units),
                   in_units(story.mass, Dimension::mass, units), in_units(story.dashpot, Dimension::dashpot, units),
                   law_text(story.spring, units)});
  }
  return table.text();
}

std::string periods_text(const std::vector<double>& periods) { return fmt::format("{:.4g}", fmt::join(periods, ", ")); }

std::string buildings_table(const Study& study) {
  const StudyUnits& units = study.units;
  TextTable table({{"building", Align::left},
                   {"stories"},
                   {titled("height", Dimension::length, units)},
                   {titled("weight", Dimension::force, units)},
                   {"first periods (s)", Align::left},
                   {"file", Align::left}});
  for (const StudyBuilding& building : study.buildings) {
    const BuildingFacts facts = facts_of(building);
    table.add_row({building.name, fmt::format("{}", building.stick.stories.size()),
                   in_units(facts.height, Dimension::length, units), in_units(facts.weight, Dimension::force, units),
                   periods_text(facts.first_periods), building.file.string()});
  }
  return table.text();
}

}  // namespace

BuildingFacts facts_of(const StudyBuilding& building) {
  BuildingFacts facts;
  for (const Story& story : building.stick.stories) {
    facts.height += story.height;
    facts.weight += story.mass * building.stick.gravity;
  }
  const std::vector<Mode> modes = assembled(building).summary.modes;
  for (std::size_t i = 0; i < std::min<std::size_t>(3, modes.size()); ++i)
    facts.first_periods.push_back(modes[i].period);
  return facts;
}

std::string building_text(const StudyBuilding& building, const StudyUnits& units) {
  const Stick& stick = building.stick;
  const BuildingFacts facts = facts_of(building);
  return fmt::format(
      "building: stick, {} {}, height {}, weight {}, P-Delta {}, gravity {:.6g} m/s2\n{}first periods: {} s\n"
      "damping: {}\n",
      stick.stories.size(), stick.stories.size() == 1 ? "story" : "stories",
      with_unit(facts.height, Dimension::length, units), with_unit(facts.weight, Dimension::force, units),
      stick.p_delta ? "on" : "off", stick.gravity, stories_table(stick, units), periods_text(facts.first_periods),
      damping_text(stick.damping));
}

std::string buildings_text(const Study& study) {
  if (study.buildings.size() == 1 && study.buildings[0].file.empty())
    return building_text(study.buildings[0], study.units);
  return fmt::format("buildings: {} (check a building file to see its stories)\n{}", study.buildings.size(),
                     buildings_table(study));
}

}  // namespace pilotis
