#include <fmt/format.h>

#include <algorithm>

#include "io/study/motion_files.hpp"
#include "io/study/sections.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

constexpr Parameter force_factor{"factor", Dimension::none, "the factor of this force", 1.0};
constexpr Parameter time_of_point{"table", Dimension::time, "a time", {}, 0.0};
constexpr Parameter force_of_point{"table", Dimension::force, "a force"};
constexpr Parameter displacement{"displacement", Dimension::length, "the displacement of a floor"};
constexpr Parameter velocity{"velocity", Dimension::velocity, "the velocity of a floor"};

FloorForce from_table(const ValueReader& value) {
  FloorForce force;
  for (const ValueReader& row : value.items()) {
    const std::vector<ValueReader> point = row.items();
    if (point.size() != 2) throw row.wrong_type("a pair [time, force] is needed");
    force.times.push_back(point[0].quantity(time_of_point));
    force.forces.push_back(point[1].quantity(force_of_point));
  }
  require_rising(force, value.where());
  return force;
}

FloorForce from_file(const TableReader& table, const fs::path& folder) {
  const ValueReader file = table.at("file", "");
  const ValueReader units = table.at("units", "give the unit of the forces in the file, such as \"kN\"");
  const double factor = si_factor(units.text(), Dimension::force, units.where());
  const std::vector<fs::path> files = files_named(file, folder);
  if (files.size() != 1) throw file.wrong(fmt::format("found {} files", files.size()), "name one file");
  return read_force_file(files.front(), factor);
}

FloorForce over_time(const TableReader& table, const fs::path& folder) {
  const auto points = table.find("table");
  const auto file = table.find("file");
  if (points && file) throw file->wrong("found both table and file", "give exactly one of the two");
  if (file) return from_file(table, folder);
  if (!points)
    throw table.wrong("the force over time is missing", "give table = [[time, force], ...] or file = \"...\"");
  if (const auto units = table.find("units"))
    throw units->wrong("found units beside a table", "units are for a file; a table is in the study's units");
  return from_table(*points);
}

int floors_of(const StudyBuilding& building) { return static_cast<int>(building.stick.stories.size()); }

// `building "B" (towers/b.toml)`; a study's own building needs no name.
std::string called(const StudyBuilding& building) {
  if (building.file.empty()) return "the building";
  return fmt::format("building \"{}\" ({})", building.name, building.file.string());
}

int read_floor(const TableReader& table, std::span<const StudyBuilding> buildings) {
  int most = 0;
  for (const StudyBuilding& building : buildings) most = std::max(most, floors_of(building));
  const double floor = table.quantity(whole_number("floor", "the number of the floor", 1, most));
  for (const StudyBuilding& building : buildings)
    if (floor > floors_of(building))
      throw table.at("floor", "")
          .wrong(fmt::format("found {:g}, and {} has {} floor(s)", floor, called(building), floors_of(building)),
                 "name a floor that every building has, from floor 1 up");
  return static_cast<int>(floor);
}

FloorForce read_force(TableReader table, std::span<const StudyBuilding> buildings, const fs::path& folder) {
  table.known_keys({"floor", "factor", "table", "file", "units"});
  const int floor = read_floor(table, buildings);
  const double factor = table.quantity(force_factor);
  if (factor == 0) throw table.at("factor", "").wrong("found 0", "a force with the factor 0 is no force");
  FloorForce force = over_time(table, folder);
  force.floor = floor;
  for (double& value : force.forces) value *= factor;
  return force;
}

std::vector<double> per_floor(const TableReader& table, const Parameter& parameter,
                              std::span<const StudyBuilding> buildings) {
  const auto value = table.find(parameter.key);
  if (!value) return {};
  const std::vector<double> values = value->quantities(parameter);
  for (const StudyBuilding& building : buildings)
    if (static_cast<int>(values.size()) != floors_of(building))
      throw value->wrong(fmt::format("found {} value(s), and {} has {} floor(s)", values.size(), called(building),
                                     floors_of(building)),
                         "give one for each floor, from floor 1 up");
  return values;
}

bool all_zero(const std::vector<double>& values) {
  return std::all_of(values.begin(), values.end(), [](double v) { return v == 0; });
}

}  // namespace

std::vector<FloorForce> read_forces(const TableReader& root, std::span<const StudyBuilding> buildings,
                                    const fs::path& folder) {
  std::vector<FloorForce> forces;
  for (const TableReader& table : root.tables("force")) forces.push_back(read_force(table, buildings, folder));
  return forces;
}

InitialState read_initial(TableReader table, std::span<const StudyBuilding> buildings) {
  table.known_keys({"displacement", "velocity"});
  InitialState state{per_floor(table, displacement, buildings), per_floor(table, velocity, buildings)};
  if (all_zero(state.displacement) && all_zero(state.velocity))
    throw table.wrong("found no displacement and no velocity other than 0",
                      "give displacement = [...] or velocity = [...], or leave [initial] out");
  return state;
}

}  // namespace pilotis
