#include "apps/fit_options.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "apps/typed_values.hpp"
#include "core/error.hpp"
#include "core/motion/spectra/response_spectrum.hpp"

namespace pilotis {

namespace {

constexpr double code_damping = 0.05;

// As typed, or `share` of the building's period.
double end_of_range(const std::string& typed, double share, const FitOptions& options, const std::string& option) {
  const std::string where = fmt::format("{} {}", options.command, option);
  if (!typed.empty()) return typed_quantity(typed, Dimension::time, where);
  if (options.code.periods.empty())
    throw input_error(where, "it is missing", "give --from and --to, or the building's --period (0.2 to 2 times it)");
  std::vector<double> periods;
  for (const std::string& period : options.code.periods)
    periods.push_back(typed_quantity(period, Dimension::time, options.command + " --period"));
  return share * (share < 1 ? *std::min_element(periods.begin(), periods.end())
                            : *std::max_element(periods.begin(), periods.end()));
}

RecordHints hints_of(const FitOptions& options) {
  RecordHints hints;
  if (!options.units.empty()) hints.unit = options.units;
  if (!options.step.empty()) hints.step = typed_quantity(options.step, Dimension::time, options.command + " --step");
  return hints;
}

std::vector<double> fitted_periods(double from, double to, const FitOptions& options) {
  constexpr double usual_per_decade = 30;  // of matched periods; between them the spectrum is free
  int count = options.periods;
  if (count == 0 && options.matching && to > from && from > 0)
    count = 1 + static_cast<int>(std::ceil(usual_per_decade * std::log10(to / from)));
  return period_grid(from, to, count > 0 ? count : checked_periods, options.command + " --from");
}

// For the picture: from half the range's begin to twice its end.
std::vector<double> shown_periods(double from, double to, const std::string& where) {
  constexpr int count = 240;
  return period_grid(from / 2, to * 2, count, where);
}

}  // namespace

void add_fit_options(CLI::App& command, FitOptions& options) {
  const bool matching = options.matching;
  command.add_option("files", options.files, "records, pairs of horizontal components as A+B, or folders of records")
      ->required();
  add_target_options(command, options.target);
  command
      .add_option("--damping", options.dampings,
                  matching ? "damping ratios to match at, fractions of critical [0.05]"
                           : "damping ratio of the target and the spectra, a fraction of critical [0.05]")
      ->expected(1, matching ? 10 : 1);
  command.add_option("--from", options.from, "shortest period of the fit; a bare number is in s [0.2 times --period]");
  command.add_option("--to", options.to, "longest period of the fit; a bare number is in s [2 times --period]");
  command
      .add_option("--periods", options.periods,
                  fmt::format("how many periods in equal ratios [{}]", matching ? "30 a decade" : "200"))
      ->check(CLI::Range(2, 10000));
  command.add_option("--units", options.units, "acceleration unit of records that do not say, e.g. g");
  command.add_option("--step", options.step, "time step of records that do not say; a bare number is in s");
  add_code_options(command, options.code, matching);
  command.add_option("--csv", options.csv, "writes the spectra before and after as CSV");
  command.add_option("--svg", options.svg, "draws the spectra before and after with the target");
  command.add_flag("--json", options.json, "everything as JSON on standard output");
}

FitTask task_of(const FitOptions& options) {
  FitTask task;
  task.motions = motions_typed(options.files, options.command);
  task.hints = hints_of(options);
  task.from = end_of_range(options.from, 0.2, options, "--from");
  task.to = end_of_range(options.to, 2, options, "--to");
  for (const double damping : options.dampings)
    task.targets.push_back(target_of(options.target, damping, options.command));
  task.periods = fitted_periods(task.from, task.to, options);
  for (const double period : task.periods) task.target_ordinates.push_back(task.targets[0].acceleration(period));
  if (!options.svg.empty()) task.shown = shown_periods(task.from, task.to, options.command);
  task.code =
      code_check(options.code, options.target, task.from, task.to, task.motions.front().is_pair(), options.command);
  return task;
}

std::vector<Oscillator> wanted_oscillators(const FitTask& task) {
  const double damping = task.targets[0].damping();
  std::vector<Oscillator> oscillators;
  for (const double period : task.periods) oscillators.push_back({period, damping});
  for (const double period : task.shown) oscillators.push_back({period, damping});
  for (const double period : task.code.periods) oscillators.push_back({period, code_damping});
  return oscillators;
}

SpectrumParts parts_of(const std::vector<double>& accelerations, const FitTask& task) {
  const auto shown = accelerations.begin() + static_cast<std::ptrdiff_t>(task.periods.size());
  const auto code = shown + static_cast<std::ptrdiff_t>(task.shown.size());
  return {{accelerations.begin(), shown}, {shown, code}, {code, accelerations.end()}};
}

}  // namespace pilotis
