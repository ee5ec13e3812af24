#include <algorithm>
#include <cmath>
#include <limits>

#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();
using Axes = GroupWriter::Axes;

std::size_t most_modes(const Buildings& buildings) {
  std::size_t most = 0;
  for (const BuildingSummary& building : buildings) most = std::max(most, building.modes.size());
  return most;
}

// One row per building, filled up with NaN: rows(building) gives [..][length], stored in steps of `most`.
template <class Rows>
void write_padded(GroupWriter& group, const std::string& name, const Axes& axes, const Buildings& buildings,
                  std::size_t most, Rows rows, std::string_view units, std::string_view long_name) {
  H5::DataSet array = group.empty_numbers(name, axes, units, long_name);
  std::vector<double> padded(row_width(array));
  for (std::size_t b = 0; b < buildings.size(); ++b) {
    std::fill(padded.begin(), padded.end(), unknown);
    std::size_t at = 0;
    for (const std::vector<double>& row : rows(buildings[b])) {
      std::copy(row.begin(), row.end(), padded.begin() + static_cast<std::ptrdiff_t>(at));
      at += most;
    }
    write_rows(array, b, std::span<const double>(padded));
  }
}

void write_names(GroupWriter& group, const Buildings& buildings) {
  std::vector<std::string> names, titles;
  std::vector<std::int64_t> stories;
  for (const BuildingSummary& building : buildings) {
    names.push_back(building.name);
    titles.push_back(building.title);
    stories.push_back(static_cast<std::int64_t>(building.heights.size()));
  }
  group.texts("name", {"building"}, names, "name of the building in the study");
  group.texts("title", {"building"}, titles, "title of the building");
  group.integers("stories", {"building"}, stories, "number of stories");
}

void write_labels(GroupWriter& group, const Buildings& buildings, std::size_t stories) {
  H5::DataSet array = group.empty_texts("label", {"building", "story"}, "what the user calls the story");
  for (std::size_t b = 0; b < buildings.size(); ++b) {
    std::vector<const char*> row(stories, "");
    const auto& labels = buildings[b].labels;
    for (std::size_t i = 0; i < std::min(stories, labels.size()); ++i) row[i] = labels[i].c_str();
    write_rows(array, b, row);
  }
}

void write_per_mode(GroupWriter& group, const std::string& name, const Buildings& buildings, double Mode::*member,
                    std::string_view units, std::string_view long_name) {
  const auto row = [member](const BuildingSummary& building) {
    std::vector<double> values;
    for (const Mode& mode : building.modes) values.push_back(mode.*member);
    return std::vector<std::vector<double>>{values};
  };
  write_padded(group, name, {"building", "mode"}, buildings, 0, row, units, long_name);
}

void write_modes(GroupWriter& group, const Buildings& buildings, std::size_t floors) {
  const std::size_t modes = most_modes(buildings);
  if (modes == 0) return;
  group.count_scale("mode", 1, modes, "mode of vibration, from the longest period");
  write_per_mode(group, "period", buildings, &Mode::period, "s", "natural period");
  write_per_mode(group, "participation", buildings, &Mode::participation, "1",
                 "participation factor, with the shape as given");
  write_per_mode(group, "effective_mass", buildings, &Mode::effective_mass, "kg", "effective modal mass");
  write_per_mode(group, "damping_ratio", buildings, &Mode::damping_ratio, "1", "fraction of critical damping");
  const auto shapes = [](const BuildingSummary& building) {
    std::vector<std::vector<double>> rows;
    for (const Mode& mode : building.modes) rows.push_back(mode.shape);
    return rows;
  };
  write_padded(group, "shape", {"building", "mode", "floor"}, buildings, floors, shapes, "1",
               "mode shape, largest magnitude 1, roof positive");
}

void write_matrix(GroupWriter& group, const std::string& name, const Buildings& buildings, std::size_t floors,
                  std::vector<double> BuildingSummary::*member, std::string_view units, std::string_view long_name) {
  const auto rows = [member](const BuildingSummary& building) {
    const std::vector<double>& matrix = building.*member;
    const auto own = static_cast<std::ptrdiff_t>(building.masses.size());
    std::vector<std::vector<double>> split;
    for (auto from = matrix.begin(); from != matrix.end(); from += own) split.emplace_back(from, from + own);
    return split;
  };
  write_padded(group, name, {"building", "floor", "moved_floor"}, buildings, floors, rows, units, long_name);
}

// The first `count` numbers of a row of `width`.
std::vector<double> part(const std::vector<double>& values, std::size_t row, std::size_t width, std::size_t count) {
  const auto from = values.begin() + static_cast<std::ptrdiff_t>(row * width);
  return {from, from + static_cast<std::ptrdiff_t>(count)};
}

void read_modes(const GroupReader& group, Buildings& buildings, std::size_t floors) {
  const std::size_t modes = group.length("mode"), all = buildings.size() * modes;
  if (modes == 0) return;
  const auto period = group.numbers("period", all), participation = group.numbers("participation", all);
  const auto mass = group.numbers("effective_mass", all), damping = group.numbers("damping_ratio", all);
  const auto shapes = group.numbers("shape", all * floors);
  for (std::size_t i = 0; i < all; ++i) {
    BuildingSummary& building = buildings[i / modes];
    if (std::isnan(period[i])) continue;  // it has fewer
    building.modes.push_back(
        {period[i], participation[i], mass[i], damping[i], part(shapes, i, floors, building.masses.size())});
  }
}

}  // namespace

std::size_t most_stories(const Buildings& buildings) {
  std::size_t most = 0;
  for (const BuildingSummary& building : buildings) most = std::max(most, building.heights.size());
  return most;
}

void write_buildings(H5::H5File& file, const Buildings& buildings) {
  GroupWriter group(file, "/building");
  const std::size_t stories = most_stories(buildings);
  group.count_scale("building", 0, buildings.size(), "building of the study, counted from 0");
  group.count_scale("story", 1, stories, "story, counted from the ground up");
  group.count_scale("floor", 1, stories, "floor, counted from the ground up; floor 0 is the ground");
  group.count_scale("moved_floor", 1, stories, "floor that moves, for a matrix column");
  write_names(group, buildings);
  write_labels(group, buildings, stories);
  const auto row_of = [](std::vector<double> BuildingSummary::*member) {
    return [member](const BuildingSummary& building) { return std::vector<std::vector<double>>{building.*member}; };
  };
  write_padded(group, "height", {"building", "story"}, buildings, 0, row_of(&BuildingSummary::heights), "m",
               "story height");
  write_padded(group, "mass", {"building", "floor"}, buildings, 0, row_of(&BuildingSummary::masses), "kg",
               "floor mass");
  write_modes(group, buildings, stories);
  write_matrix(group, "M", buildings, stories, &BuildingSummary::mass_matrix, "kg", "mass matrix");
  write_matrix(group, "C", buildings, stories, &BuildingSummary::damping_matrix, si_unit(Dimension::dashpot),
               "damping matrix");
  write_matrix(group, "K", buildings, stories, &BuildingSummary::stiffness_matrix, si_unit(Dimension::stiffness),
               "initial stiffness matrix, with P-Delta");
}

Buildings read_buildings(const ResultFile& from) {
  const GroupReader group(from.file, from.where, "/building");
  const std::size_t count = group.length("building"), stories = group.length("story");
  Buildings buildings(count);
  const auto names = group.texts("name", count), titles = group.texts("title", count),
             labels = group.texts("label", count * stories);
  const auto heights = group.numbers("height", count * stories), masses = group.numbers("mass", count * stories),
             own = group.numbers("stories", count);
  for (std::size_t b = 0; b < count; ++b) {
    const auto n = static_cast<std::size_t>(std::clamp(own[b], 0.0, static_cast<double>(stories)));
    const auto label = labels.begin() + static_cast<std::ptrdiff_t>(b * stories);
    buildings[b].name = names[b];
    buildings[b].title = titles[b];
    buildings[b].labels.assign(label, label + static_cast<std::ptrdiff_t>(n));
    buildings[b].heights = part(heights, b, stories, n);
    buildings[b].masses = part(masses, b, stories, n);
  }
  read_modes(group, buildings, stories);
  return buildings;
}

}  // namespace pilotis
