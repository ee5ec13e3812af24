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

StoredStudy sample() {
  StoredStudy stored = invented::study_with_open_run();
  stored.results.runs[0] = invented::calm_study().results.runs[0];  // with its histories
  stored.limits.push_back({find_quantity("base_shear"), Statistic::percentile, 84, 3.2e6, "sheet 3", {0.5, 1.5}});
  return stored;
}

void expect_peaks(json& expected, const StudyResults& results) {
  const ResponseLayout layout(invented::stories);
  for (const Quantity& quantity : quantities()) {
    std::vector<double> values, times, errors;
    for (const RunResult& run : results.runs)
      for (std::size_t i = 0; i < layout.count(quantity); ++i) {
        const Peak& peak = run.peaks[layout.offset(quantity) + i];
        values.push_back(peak.value);
        times.push_back(peak.time);
        errors.push_back(peak.step_error);
      }
    expected[fmt::format("/peaks/{}", quantity.name)] = numbers(values);
    expected[fmt::format("/peaks/{}_time", quantity.name)] = numbers(times);
    expected[fmt::format("/peaks/{}_step_error", quantity.name)] = numbers(errors);
  }
}

void expect_runs(json& expected, const std::vector<RunResult>& runs) {
  json motion = json::array(), status = json::array(), note = json::array();
  std::vector<double> factor, reached;
  for (const RunResult& run : runs) {
    motion.push_back(run.motion);
    status.push_back(status_name(run.status));
    note.push_back(run.status_note);
    factor.push_back(run.factor);
    reached.push_back(run.time_reached);
  }
  expected["/runs/motion"] = motion;
  expected["/runs/status"] = status;
  expected["/runs/status_note"] = note;
  expected["/runs/factor"] = numbers(factor);
  expected["/runs/time_reached"] = numbers(reached);
}

json expectation(const StoredStudy& stored, const Verdict& verdict) {
  json expected;
  const StudyResults& results = stored.results;
  expect_peaks(expected, results);
  expect_runs(expected, results.runs);
  expected["/building/height"] = numbers(results.building.heights);
  expected["/building/K"] = numbers(results.building.stiffness_matrix);
  expected["/building/label"] = results.building.labels;
  expected["/histories/0/time"] = numbers(results.runs[0].times);
  for (const History& history : results.runs[0].histories)
    expected[fmt::format("/histories/0/{}", history.quantity->name)] = numbers(history.values);
  std::vector<double> margins;
  for (const Outcome& outcome : verdict.outcomes) margins.push_back(outcome.margin);
  expected["/verdict/margin"] = numbers(margins);
  return expected;
}

}  // namespace
}  // namespace pilotis

int main(int argc, char** argv) {
  if (argc != 3) return 2;
  const auto stored = pilotis::sample();
  const auto verdict = pilotis::judge(stored.results, stored.limits);
  pilotis::write_results(argv[1], stored, verdict);
  std::ofstream(argv[2]) << pilotis::expectation(stored, verdict).dump();
}
