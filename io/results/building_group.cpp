#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

// One number per mode, told apart by a member of Mode.
std::vector<double> per_mode(const BuildingSummary& building, double Mode::*member) {
  std::vector<double> values;
  for (const Mode& mode : building.modes) values.push_back(mode.*member);
  return values;
}

void write_modes(GroupWriter& group, const BuildingSummary& building) {
  if (building.modes.empty()) return;
  group.count_scale("mode", 1, building.modes.size(), "mode of vibration, from the longest period");
  group.numbers("period", {"mode"}, per_mode(building, &Mode::period), "s", "natural period");
  group.numbers("participation", {"mode"}, per_mode(building, &Mode::participation), "1",
                "participation factor, with the shape as given");
  group.numbers("effective_mass", {"mode"}, per_mode(building, &Mode::effective_mass), "kg", "effective modal mass");
  group.numbers("damping_ratio", {"mode"}, per_mode(building, &Mode::damping_ratio), "1",
                "fraction of critical damping");
  std::vector<double> shapes;
  for (const Mode& mode : building.modes) shapes.insert(shapes.end(), mode.shape.begin(), mode.shape.end());
  group.numbers("shape", {"mode", "floor"}, shapes, "1", "mode shape, largest magnitude 1, roof positive");
}

void write_matrix(GroupWriter& group, const std::string& name, const std::vector<double>& values,
                  std::string_view units, std::string_view long_name) {
  if (!values.empty()) group.numbers(name, {"floor", "moved_floor"}, values, units, long_name);
}

void read_modes(const GroupReader& group, BuildingSummary& building) {
  const std::size_t modes = group.length("mode"), floors = building.masses.size();
  building.modes.resize(modes);
  if (modes == 0) return;
  const auto period = group.numbers("period", modes), participation = group.numbers("participation", modes);
  const auto mass = group.numbers("effective_mass", modes), damping = group.numbers("damping_ratio", modes);
  const auto shapes = group.numbers("shape", modes * floors);
  for (std::size_t i = 0; i < modes; ++i) {
    const auto shape = shapes.begin() + static_cast<std::ptrdiff_t>(i * floors);
    building.modes[i] = {period[i], participation[i], mass[i], damping[i],
                         std::vector<double>(shape, shape + static_cast<std::ptrdiff_t>(floors))};
  }
}

std::vector<double> read_matrix(const GroupReader& group, const std::string& name, std::size_t floors) {
  return group.has(name) ? group.numbers(name, floors * floors) : std::vector<double>{};
}

}  // namespace

void write_building(H5::H5File& file, const BuildingSummary& building) {
  GroupWriter group(file, "/building");
  group.attribute("title", building.title);
  const std::size_t floors = building.masses.size();
  group.count_scale("story", 1, building.heights.size(), "story, counted from the ground up");
  group.count_scale("floor", 1, floors, "floor, counted from the ground up; floor 0 is the ground");
  group.count_scale("moved_floor", 1, floors, "floor that moves, for a matrix column");
  auto labels = building.labels;
  labels.resize(building.heights.size());
  group.texts("label", {"story"}, labels, "what the user calls the story");
  group.numbers("height", {"story"}, building.heights, "m", "story height");
  group.numbers("mass", {"floor"}, building.masses, "kg", "floor mass");
  write_modes(group, building);
  write_matrix(group, "M", building.mass_matrix, "kg", "mass matrix");
  write_matrix(group, "C", building.damping_matrix, si_unit(Dimension::dashpot), "damping matrix");
  write_matrix(group, "K", building.stiffness_matrix, si_unit(Dimension::stiffness),
               "initial stiffness matrix, with P-Delta");
}

BuildingSummary read_building(const ResultFile& from) {
  const GroupReader group(from.file, from.where, "/building");
  BuildingSummary building;
  building.title = group.text_attribute("title");
  const std::size_t stories = group.length("story"), floors = group.length("floor");
  building.labels = group.texts("label", stories);
  building.heights = group.numbers("height", stories);
  building.masses = group.numbers("mass", floors);
  read_modes(group, building);
  building.mass_matrix = read_matrix(group, "M", floors);
  building.damping_matrix = read_matrix(group, "C", floors);
  building.stiffness_matrix = read_matrix(group, "K", floors);
  return building;
}

}  // namespace pilotis
