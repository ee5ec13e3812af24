// Writes an invented result file, and beside it as JSON the numbers that must be found in it: for check_with_python.py.
#include <fmt/format.h>

#include <cmath>
#include <fstream>
#include <nlohmann/json.hpp>

#include "tests/support/invented_results.hpp"

namespace pilotis {
namespace {

using nlohmann::json;

// JSON has no NaN and no infinity; the check knows these words.
json number(double x) {
  if (std::isnan(x)) return "nan";
  if (std::isinf(x)) return x > 0 ? "inf" : "-inf";
  return x;
}

json numbers(const std::vector<double>& values) {
  json list = json::array();
  for (double x : values) list.push_back(number(x));
  return list;
}

// A second building, of five stories, whose runs are those of the first up to there.
void add_second_building(StoredStudy& stored) {
  constexpr std::size_t stories = 5;
  const ResponseLayout tall(invented::stories), low(stories);
  BuildingSummary building = stored.buildings[0];
  building.name = "Annex";
  building.labels.resize(stories);
  building.heights.resize(stories);
  building.masses.resize(stories);
  building.modes.resize(1);
  building.modes[0].shape.resize(stories);
  for (auto member :
       {&BuildingSummary::mass_matrix, &BuildingSummary::damping_matrix, &BuildingSummary::stiffness_matrix})
    (building.*member).assign(stories * stories, 7.0);
  const std::vector<RunResult> runs = stored.runs;
  for (RunResult run : runs) {
    run.building = 1;
    const std::vector<Peak> peaks = run.peaks;
    run.peaks.clear();
    for (const Quantity& quantity : quantities())
      for (std::size_t i = 0; i < low.count(quantity); ++i) run.peaks.push_back(peaks[tall.offset(quantity) + i]);
    for (auto member : {&RunResult::residual_drift, &RunResult::residual_swing, &RunResult::residual_error})
      if (!(run.*member).empty()) (run.*member).resize(stories);
    run.times.clear();
    run.histories.clear();
    stored.runs.push_back(run);
  }
  stored.buildings.push_back(building);
}

StoredStudy sample() {
  StoredStudy stored = invented::study_with_open_run();
  stored.runs[0] = invented::calm_study().runs[0];  // with its histories
  stored.limits.push_back({find_quantity("base_shear"), Statistic::percentile, 84, 3.2e6, "sheet 3", {0.5, 1.5}});
  add_second_building(stored);
  return stored;
}

void expect_peaks(json& expected, const StoredStudy& stored) {
  for (const Quantity& quantity : quantities()) {
    const std::size_t width = quantity.per == Per::run ? 1 : invented::stories;
    std::vector<double> values, times, errors;
    for (const RunResult& run : stored.runs) {
      const ResponseLayout layout(
          static_cast<int>(stored.buildings[static_cast<std::size_t>(run.building)].heights.size()));
      for (std::size_t i = 0; i < width; ++i) {
        const bool own = i < layout.count(quantity);
        const Peak peak = own ? run.peaks[layout.offset(quantity) + i] : Peak{NAN, NAN, NAN};
        values.push_back(peak.value);
        times.push_back(peak.time);
        errors.push_back(peak.step_error);
      }
    }
    expected[fmt::format("/peaks/{}", quantity.name)] = numbers(values);
    expected[fmt::format("/peaks/{}_time", quantity.name)] = numbers(times);
    expected[fmt::format("/peaks/{}_step_error", quantity.name)] = numbers(errors);
  }
}

void expect_runs(json& expected, const StoredStudy& stored) {
  json building = json::array(), motion = json::array(), status = json::array(), note = json::array();
  std::vector<double> factor, reached;
  for (const RunResult& run : stored.runs) {
    building.push_back(stored.buildings[static_cast<std::size_t>(run.building)].name);
    motion.push_back(run.motion);
    status.push_back(status_name(run.status));
    note.push_back(run.status_note);
    factor.push_back(run.factor);
    reached.push_back(run.time_reached);
  }
  expected["/runs/building"] = building;
  expected["/runs/motion"] = motion;
  expected["/runs/status"] = status;
  expected["/runs/status_note"] = note;
  expected["/runs/factor"] = numbers(factor);
  expected["/runs/time_reached"] = numbers(reached);
}

// [building][row][column], filled up to the tallest.
std::vector<double> matrices(const StoredStudy& stored, std::vector<double> BuildingSummary::*member) {
  std::vector<double> all;
  for (const BuildingSummary& building : stored.buildings) {
    const std::size_t own = building.heights.size(), most = invented::stories;
    for (std::size_t i = 0; i < most * most; ++i) {
      const std::size_t row = i / most, column = i % most;
      all.push_back(row < own && column < own ? (building.*member)[row * own + column] : NAN);
    }
  }
  return all;
}

void expect_buildings(json& expected, const StoredStudy& stored) {
  std::vector<double> heights;
  json labels = json::array();
  for (const BuildingSummary& building : stored.buildings)
    for (std::size_t i = 0; i < invented::stories; ++i) {
      const bool own = i < building.heights.size();
      heights.push_back(own ? building.heights[i] : NAN);
      labels.push_back(own ? building.labels[i] : "");
    }
  expected["/building/height"] = numbers(heights);
  expected["/building/label"] = labels;
  expected["/building/stories"] = {8, 5};
  expected["/building/name"] = {stored.buildings[0].name, "Annex"};
  expected["/building/M"] = numbers(matrices(stored, &BuildingSummary::mass_matrix));
  expected["/building/C"] = numbers(matrices(stored, &BuildingSummary::damping_matrix));
  expected["/building/K"] = numbers(matrices(stored, &BuildingSummary::stiffness_matrix));
}

json expectation(const StoredStudy& stored, const Verdict& verdict) {
  json expected;
  expect_peaks(expected, stored);
  expect_runs(expected, stored);
  expect_buildings(expected, stored);
  expected["/histories/0/time"] = numbers(stored.runs[0].times);
  for (const History& history : stored.runs[0].histories)
    expected[fmt::format("/histories/0/{}", history.quantity->name)] = numbers(history.values);
  std::vector<double> margins;
  json buildings = json::array();
  for (const Outcome& outcome : verdict.outcomes) {
    margins.push_back(outcome.margin);
    buildings.push_back(stored.buildings[static_cast<std::size_t>(outcome.building)].name);
  }
  expected["/verdict/margin"] = numbers(margins);
  expected["/verdict/building"] = buildings;
  return expected;
}

}  // namespace
}  // namespace pilotis

int main(int argc, char** argv) {
  if (argc != 3) return 2;
  const auto stored = pilotis::sample();
  const auto verdict = pilotis::write_results(argv[1], stored);
  std::ofstream(argv[2]) << pilotis::expectation(stored, verdict).dump();
}
