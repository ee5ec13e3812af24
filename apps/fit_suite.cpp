#include "apps/fit_suite.hpp"

#include <fmt/format.h>

#include "apps/commands.hpp"
#include "apps/fit_report.hpp"
#include "apps/record_csv.hpp"
#include "apps/text_table.hpp"
#include "core/units/units.hpp"

namespace pilotis {

namespace {

using Json = nlohmann::ordered_json;

std::vector<double> times(double factor, std::vector<double> values) {
  for (double& value : values) value *= factor;
  return values;
}

FitReport report_of(const FitTask& task, const ChosenSuite& suite, const std::vector<double>& factors) {
  FitReport report;
  SuiteSpectra code{task.code.periods, {}};
  std::vector<double> peaks;
  for (std::size_t m = 0; m < factors.size(); ++m) {
    SpectrumParts parts = parts_of(times(factors[m], suite.spectra[m].accelerations), task);
    report.names.push_back(suite.motions[m].name);
    report.each.push_back(std::move(parts.fitted));
    report.shown_each.push_back(std::move(parts.shown));
    code.accelerations.push_back(std::move(parts.code));
    peaks.push_back(factors[m] * suite.spectra[m].peak);
  }
  const SpectrumParts before = parts_of(suite.before, task);
  report.before_name = suite.before_name;
  report.after_name = fmt::format("mean of {} scaled", factors.size());
  report.before = before.fitted;
  report.shown_before = before.shown;
  report.after = mean_of(report.each);
  report.shown_after = mean_of(report.shown_each);
  if (task.code.findings) report.findings = task.code.findings(code, peaks);
  return report;
}

std::string factors_text(const ChosenSuite& suite, const std::vector<double>& factors) {
  using enum TextTable::Align;
  TextTable table({{"motion", left}, {"factor"}, {"peak as given (g)"}, {"peak scaled (g)"}});
  for (std::size_t m = 0; m < factors.size(); ++m) {
    const double peak = suite.spectra[m].peak / standard_gravity;
    table.add_row({suite.motions[m].name, fmt::format("{:.4f}", factors[m]), fmt::format("{:.4f}", peak),
                   fmt::format("{:.4f}", factors[m] * peak)});
  }
  return table.text();
}

std::vector<std::string> facts(const FitTask& task, const ChosenSuite& suite, const ScaledSuite& scaled) {
  std::vector<std::string> lines{"target: " + task_text(task)};
  if (task.motions.front().is_pair()) lines.push_back("spectra: RotD100 (maximum direction) of each pair");
  lines.insert(lines.end(), suite.remarks.begin(), suite.remarks.end());
  lines.push_back(fmt::format("mean over target: least {:.4f} at {:.4g} s, off by {:.1f} % (root mean square of ln)",
                              scaled.least, task.periods[scaled.least_at], 100 * scaled.misfit));
  if (scaled.lift > 1) lines.push_back(fmt::format("all factors lifted by {:.4f} for that least", scaled.lift));
  return lines;
}

// A row for each file: both components of a pair have its factor.
std::string factors_csv(const FitOptions& options, const FitTask& task, const ChosenSuite& suite,
                        const ScaledSuite& scaled) {
  std::string text = fmt::format("# pilotis {} {}\n", PILOTIS_VERSION, options.command);
  for (const std::string& line : facts(task, suite, scaled)) text += fmt::format("# {}\n", line);
  text += "file, factor (1)\n";
  for (std::size_t m = 0; m < suite.motions.size(); ++m)
    for (const std::string& file : suite.motions[m].files) text += fmt::format("{}, {}\n", file, scaled.factors[m]);
  return text;
}

std::string study_text(const FitOptions& options, const FitTask& task, const ChosenSuite& suite,
                       const ScaledSuite& scaled) {
  std::string more;
  if (!options.units.empty()) more += fmt::format(", units = {}", Json(options.units).dump());
  if (task.hints.step) more += fmt::format(", step = {}", *task.hints.step);
  std::string text =
      fmt::format("# {}; paths as typed: mend them where the study stands in another folder\n", options.command);
  for (const std::string& line : facts(task, suite, scaled)) text += fmt::format("# {}\n", line);
  text += "[suite]\nmotions = [\n";
  for (std::size_t m = 0; m < suite.motions.size(); ++m)
    for (const std::string& file : suite.motions[m].files)
      text += fmt::format("  {{ file = {}, factor = {}{} }},\n", Json(file).dump(), scaled.factors[m], more);
  return text + "]\n";
}

Json json_of(const FitOptions& options, const FitTask& task, const ChosenSuite& suite, const ScaledSuite& scaled,
             const FitReport& report) {
  Json json{{"command", options.command}};
  json.update(report_json(report, task));
  json["spectrum_of_motion"] = task.motions.front().is_pair() ? "RotD100" : "one component";
  json["motions"] = Json::array();
  for (std::size_t m = 0; m < suite.motions.size(); ++m)
    json["motions"].push_back({{"files", suite.motions[m].files},
                               {"factor", scaled.factors[m]},
                               {"peak_as_given_m_per_s2", suite.spectra[m].peak}});
  json["offered"] = task.motions.size();
  json["lift"] = scaled.lift;
  json["misfit_ln"] = scaled.misfit;
  json["least_mean_over_target"] = scaled.least;
  json["least_at_s"] = task.periods[scaled.least_at];
  return json;
}

void print_text(const FitTask& task, const ChosenSuite& suite, const ScaledSuite& scaled, const FitReport& report) {
  std::string text;
  for (const std::string& line : facts(task, suite, scaled)) text += line + "\n";
  text += fmt::format("\n{}\nPseudo-acceleration, damping {:g} %:\n\n{}", factors_text(suite, scaled.factors),
                      100 * task.targets[0].damping(), spectra_text(report, task));
  if (!report.findings.empty()) text += "\n" + findings_text(report.findings, screen_style(stdout));
  print_out(text);
}

}  // namespace

void add_suite_options(CLI::App& command, SuiteOptions& options) {
  command.add_flag("--single", options.single, "one factor for all motions, of their mean [a factor for each]");
  command
      .add_option("--at-least", options.at_least,
                  "lifts all factors until the mean is nowhere in the range below this share of the target, e.g. 0.9")
      ->check(CLI::Range(0.0, 10.0));
  command.add_option("-o,--output", options.output, "writes the factors as CSV");
  command.add_flag("--study", options.study, "prints the [suite] section of a study instead of tables");
}

FitProblem problem_of(const std::vector<MotionSpectrum>& spectra, const FitTask& task) {
  FitProblem problem{{}, task.target_ordinates, {}};
  for (const MotionSpectrum& spectrum : spectra)
    problem.ordinates.push_back(parts_of(spectrum.accelerations, task).fitted);
  return problem;
}

std::vector<double> mean_of(const std::vector<MotionSpectrum>& spectra) {
  std::vector<std::vector<double>> rows;
  for (const MotionSpectrum& spectrum : spectra) rows.push_back(spectrum.accelerations);
  return mean_of(rows);
}

void finish_suite(const FitOptions& options, const SuiteOptions& suite_options, const FitTask& task,
                  const ChosenSuite& suite, int& status) {
  const ScaledSuite scaled =
      scale_suite(problem_of(suite.spectra, task), suite_options.single ? Factors::single : Factors::each_motion,
                  suite_options.at_least, options.command);
  const FitReport report = report_of(task, suite, scaled.factors);
  if (!suite_options.output.empty())
    write_text_file(suite_options.output, factors_csv(options, task, suite, scaled), options.command + " --output");
  write_files(options, report, task, fmt::format("{} motions scaled to a target spectrum", suite.motions.size()));
  if (suite_options.study)
    print_out(study_text(options, task, suite, scaled));
  else if (options.json)
    print_out(json_of(options, task, suite, scaled, report).dump(2) + "\n");
  else
    print_text(task, suite, scaled, report);
  status = any_fails(report.findings) ? limit_exceeded : all_hold;
}

}  // namespace pilotis
