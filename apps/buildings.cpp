#include "apps/buildings.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>

#include "core/error.hpp"
#include "core/system/assemble_stick.hpp"
#include "core/system/summary.hpp"
#include "io/study/nearest.hpp"

namespace pilotis {

namespace {

constexpr std::size_t most_names = 30;  // in a message

std::string names_of(const std::vector<StudyBuilding>& buildings) {
  std::vector<std::string> names;
  for (std::size_t i = 0; i < std::min(buildings.size(), most_names); ++i) names.push_back(buildings[i].name);
  const std::string more =
      buildings.size() > most_names ? fmt::format(" and {} more", buildings.size() - most_names) : "";
  return fmt::format("{}{}", fmt::join(names, ", "), more);
}

// Of the names the one that was probably meant, as a question; empty when none is alike.
std::string question(const std::vector<StudyBuilding>& buildings, const std::string& name) {
  std::vector<std::string_view> names;
  for (const StudyBuilding& building : buildings) names.push_back(building.name);
  const std::string_view meant = nearest(name, names);
  return meant.empty() ? "" : fmt::format("did you mean \"{}\"? ", meant);
}

}  // namespace

AssembledBuilding assembled(const StudyBuilding& building) {
  try {
    AssembledBuilding made{assemble(building.stick), {}};
    made.summary = summary_of(building.stick, made.system, building.title);
    return made;
  } catch (const Error& error) {
    const std::string from = building.file.empty() ? "" : fmt::format(" ({})", building.file.string());
    throw Error(error.kind(), fmt::format("building \"{}\"{}: {}", building.name, from, error.where()), error.problem(),
                error.remedy());
  }
}

const StudyBuilding& building_called(const std::vector<StudyBuilding>& buildings, const std::string& name,
                                     const std::string& where) {
  if (name.empty() && buildings.size() == 1) return buildings.front();
  if (name.empty())
    throw input_error(where, fmt::format("the study has {} buildings", buildings.size()),
                      fmt::format("name one with --building: {}", names_of(buildings)));
  const auto found =
      std::find_if(buildings.begin(), buildings.end(), [&](const StudyBuilding& b) { return b.name == name; });
  if (found == buildings.end())
    throw input_error(where, fmt::format("the study has no building \"{}\"", name),
                      fmt::format("{}its buildings: {}", question(buildings, name), names_of(buildings)));
  return *found;
}

}  // namespace pilotis
