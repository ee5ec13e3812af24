#include "tests/support/invented_results.hpp"

#include <fmt/format.h>

#include <cmath>
#include <cstdlib>
#include <limits>

namespace pilotis::invented {

namespace {

constexpr int motions = 5;
constexpr double floor_mass = 420e3;  // kg
constexpr const char* motion_names[motions] = {"Aldermoor 090", "Brackwater quay", "Cinder pass", "Dunmarsh",
                                               "Elmsgate north"};
constexpr const char* labels[stories] = {"ground story", "clinic", "clinic",  "wards",
                                         "wards",        "wards",  "offices", "plant"};

double height(int story) { return story == 1 ? 4.5 : 3.5; }

BuildingSummary building() {
  BuildingSummary made;
  made.name = made.title = "Harbor clinic";
  for (int i = 1; i <= stories; ++i) {
    made.labels.emplace_back(labels[i - 1]);
    made.heights.push_back(height(i));
    made.masses.push_back(floor_mass);
  }
  for (int mode = 1; mode <= 3; ++mode) {
    Mode one{1.08 / (2 * mode - 1), 1.27 / mode, 2.8e6 / (mode * mode), 0.05, {}};
    for (int floor = 1; floor <= stories; ++floor) one.shape.push_back(std::sin(M_PI * (mode - 0.5) * floor / stories));
    made.modes.push_back(one);
  }
  made.mass_matrix.assign(stories * stories, 0);
  made.damping_matrix.assign(stories * stories, 0);
  made.stiffness_matrix.assign(stories * stories, 0);
  for (int i = 0; i < stories; ++i) {
    made.mass_matrix[i * stories + i] = floor_mass;
    made.damping_matrix[i * stories + i] = 2.1e6;
    made.stiffness_matrix[i * stories + i] = 4.2e8;
    if (i > 0) made.stiffness_matrix[i * stories + i - 1] = made.stiffness_matrix[(i - 1) * stories + i] = -2.1e8;
  }
  return made;
}

double magnitude(const Quantity& quantity, int place, int motion, double factor) {
  const double ratio = std::abs(drift_ratio(place, motion, factor));
  if (quantity.name == "drift_ratio") return ratio;
  if (quantity.name == "drift") return ratio * height(place);
  if (quantity.name == "ductility") return ratio / 0.0045;
  if (quantity.name == "floor_displacement") return 0.021 * factor * place * (1 + 0.1 * motion);
  if (quantity.name == "floor_velocity") return 0.12 * factor * place * (1 + 0.1 * motion);
  if (quantity.name == "floor_acceleration") return factor * (2.4 + 0.3 * place + 0.2 * motion);
  if (quantity.name == "overturning_moment") return 1e7 * factor * (stories + 1 - place);
  const double shear = 1.1e6 + 2.2e5 * (stories - place) * std::sqrt(factor) * (1 + 0.02 * motion);
  return quantity.name == "story_shear_damping" ? 0.1 * shear : shear;
}

void fill_peaks(RunResult& run, int motion) {
  for (const Quantity& quantity : quantities()) {
    const int places = quantity.per == Per::run ? 1 : stories;
    for (int place = 1; place <= places; ++place) {
      const double value = magnitude(quantity, place, motion, run.factor) * (motion % 2 == 0 ? 1 : -1);
      run.peaks.push_back({value, 4.0 + 0.25 * place + motion, 0.01 * std::abs(value)});
    }
  }
}

RunResult one_run(int motion, double factor) {
  RunResult run;
  run.motion = motion_names[motion];
  run.factor = factor;
  run.scheme = "newmark, beta 0.25, gamma 0.5";
  run.step = 0.005;
  run.step_choice = "half the record's step";
  run.time_reached = 41.98 + motion;
  run.energy_error = 2.3e-5;
  run.energy_input = 3.1e6 * factor;
  run.energy_damping = 2.0e6 * factor;
  run.energy_absorbed = 1.1e6 * factor;
  run.wall_time = 0.021;
  fill_peaks(run, motion);
  for (int i = 1; i <= stories; ++i) {
    run.residual_drift.push_back(0.12 * drift_ratio(i, motion, factor) * height(i));
    run.residual_swing.push_back(2e-5);
    run.residual_error.push_back(3e-5);
  }
  return run;
}

void add_histories(RunResult& run) {
  History drift{find_quantity("drift"), {}}, acceleration{find_quantity("floor_acceleration"), {}},
      shear{find_quantity("base_shear"), {}};
  for (int step = 0; step < 5; ++step) {
    run.times.push_back(0.005 * step);
    shear.values.push_back(-1e5 * step);
    for (int i = 1; i <= stories; ++i) {
      drift.values.push_back(1e-4 * step + 1e-5 * i);
      acceleration.values.push_back(0.1 * step - 0.01 * i);
    }
  }
  run.histories = {acceleration, drift, shear};
}

StoredStudy study(const std::vector<double>& factors) {
  StoredStudy made;
  made.title = "Harbor clinic, longitudinal frames";
  made.study_text = "title = \"Harbor clinic, longitudinal frames\"\n# β ≤ ¼\n";
  made.study_file = "harbor-clinic.toml";
  made.program_version = "0.1.0";
  made.created = "2026-01-01T00:00:00Z";
  made.units = {"kN", "m", ""};
  made.buildings = {building()};
  for (int m = 0; m < motions; ++m)
    made.motions.push_back({motion_names[m], fmt::format("motions/{}.csv", m), std::string(64, 'a'), 0.01, 3200, -2.9});
  for (double factor : factors)
    for (int m = 0; m < motions; ++m) made.runs.push_back(one_run(m, factor));
  made.limits = {drift_limit(Statistic::mean, 0.01)};
  return made;
}

// Ends a run early, as the march would leave it.
void end_early(RunResult& run, RunStatus status, double time, const std::string& note) {
  run.status = status;
  run.status_note = note;
  run.time_reached = time;
  run.residual_drift.clear();
  run.residual_swing.clear();
  run.residual_error.clear();
  for (Peak& peak : run.peaks) peak.step_error = std::numeric_limits<double>::quiet_NaN();
}

}  // namespace

double drift_ratio(int story, int motion, double factor) {
  const double ratio = factor * (0.006 + 0.001 * motion) * (1 - 0.08 * std::abs(story - 3));
  return motion % 2 == 0 ? ratio : -ratio;
}

Limit drift_limit(Statistic statistic, double value) {
  return {find_quantity("drift_ratio"), statistic, 84, value, "project brief, section 4", {}};
}

StoredStudy calm_study() {
  StoredStudy made = study({0.5, 1.0});
  add_histories(made.runs[0]);
  return made;
}

StoredStudy study_with_collapse() {
  StoredStudy made = study({0.5, 1.0, 1.5});
  RunResult& run = made.runs[2 * motions + 4];
  const ResponseLayout layout(stories);
  run.peaks[layout.offset(*find_quantity("drift_ratio")) + 2].value = 0.1002;
  end_early(run, RunStatus::collapsed, 8.25, "collapsed at 8.25 s: story 3 passed drift ratio 0.1");
  return made;
}

StoredStudy study_with_open_run() {
  StoredStudy made = study_with_collapse();
  end_early(made.runs[2 * motions + 2], RunStatus::not_converged, 11.5, "not converged at 11.5 s: step 4.9e-06 s");
  return made;
}

}  // namespace pilotis::invented
