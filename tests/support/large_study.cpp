#include "tests/support/large_study.hpp"

#include <fmt/format.h>

#include <cmath>
#include <limits>

namespace pilotis::invented {

namespace {

int stories_of(const Size& size, int building) { return size.stories > 0 ? size.stories : 4 + 3 * building; }

BuildingSummary building(const Size& size, int number) {
  BuildingSummary made;
  made.name = made.title = fmt::format("block {}", number);
  const int stories = stories_of(size, number);
  for (int i = 1; i <= stories; ++i) {
    made.labels.push_back(fmt::format("level {}", i));
    made.heights.push_back(3.2);
    made.masses.push_back(300e3);
  }
  Mode mode{0.1 * stories, 1.3, 250e3 * stories, 0.05, {}};
  for (int i = 1; i <= stories; ++i) mode.shape.push_back(static_cast<double>(i) / stories);
  made.modes.push_back(mode);
  const auto square = static_cast<std::size_t>(stories) * static_cast<std::size_t>(stories);
  made.mass_matrix.assign(square, 1);
  made.damping_matrix.assign(square, 2);
  made.stiffness_matrix.assign(square, 3);
  return made;
}

std::string motion_name(int motion) { return fmt::format("record {:03}", motion); }

void end_early(RunResult& run, RunStatus status) {
  run.status = status;
  run.status_note = fmt::format("{} at {} s", status_name(status), run.time_reached);
  for (Peak& peak : run.peaks) peak.step_error = std::numeric_limits<double>::quiet_NaN();
  run.residual_drift.clear();
  run.residual_swing.clear();
  run.residual_error.clear();
}

void add_histories(RunResult& run, int stories, int instants, std::size_t number) {
  History drift{find_quantity("drift"), {}}, shear{find_quantity("base_shear"), {}};
  for (int i = 0; i < instants; ++i) {
    run.times.push_back(0.005 * i);
    shear.values.push_back(1e6 * std::sin(0.02 * i + 0.1 * static_cast<double>(number)));
    for (int story = 1; story <= stories; ++story) drift.values.push_back(0.01 * std::sin(0.02 * i + story));
  }
  run.histories = {drift, shear};
}

RunResult one_run(const Size& size, std::size_t number, int instants) {
  const auto motion = static_cast<int>(number % static_cast<std::size_t>(size.motions));
  const auto of_factor = number / static_cast<std::size_t>(size.motions);
  RunResult run;
  run.building = static_cast<int>(of_factor / static_cast<std::size_t>(size.factors));
  run.factor = 0.25 * (1 + static_cast<double>(of_factor % static_cast<std::size_t>(size.factors)));
  run.motion = motion_name(motion);
  run.scheme = "newmark (beta 0.25, gamma 0.5)";
  run.step = 0.005;
  run.step_choice = "half the record's step";
  run.time_reached = 30;
  run.energy_error = 1e-6 * (1 + motion);
  run.energy_input = 1e6 * run.factor;
  run.wall_time = 0.01;
  const int stories = stories_of(size, run.building);
  // A wave over the runs, so that a percentile of a column can be told from that of another.
  const double wave = 1 + 0.5 * std::sin(static_cast<double>(number));
  run.peaks.resize(ResponseLayout(stories).size());
  for (std::size_t i = 0; i < run.peaks.size(); ++i)
    run.peaks[i] = {0.004 * run.factor * wave * (1 + 0.01 * static_cast<double>(i)), 3.5, 1e-6};
  for (int i = 0; i < stories; ++i) {
    run.residual_drift.push_back(0.001 * wave * (i + 1));
    run.residual_swing.push_back(1e-5);
    run.residual_error.push_back(2e-5);
  }
  if (number % 50 == 49) end_early(run, RunStatus::collapsed);
  if (number % 77 == 76) end_early(run, RunStatus::not_converged);
  if (instants > 0) add_histories(run, stories, instants, number);
  return run;
}

}  // namespace

StudyHeader large_header(const Size& size) {
  StudyHeader header;
  header.title = "An invented study of many runs";
  header.study_text = "title = \"An invented study of many runs\"\n";
  header.study_file = "many.toml";
  header.program_version = "0.1.0";
  header.created = "2026-01-01T00:00:00Z";
  header.units = {"kN", "m", ""};
  header.limits = {{find_quantity("drift_ratio"), Statistic::mean, 0, 0.01, "invented", {}}};
  for (int b = 0; b < size.buildings; ++b) header.buildings.push_back(building(size, b));
  for (int m = 0; m < size.motions; ++m)
    header.motions.push_back({motion_name(m), fmt::format("{}.csv", m), std::string(64, 'b'), 0.01, 3000, 2.5});
  return header;
}

std::vector<RunResult> large_runs(const Size& size, std::size_t first, std::size_t count, int instants) {
  std::vector<RunResult> runs;
  for (std::size_t i = 0; i < count; ++i) runs.push_back(one_run(size, first + i, instants));
  return runs;
}

}  // namespace pilotis::invented
