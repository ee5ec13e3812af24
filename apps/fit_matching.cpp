#include "apps/fit_matching.hpp"

#include <fmt/format.h>

#include <cmath>

#include "apps/record_csv.hpp"
#include "core/motion/fit/scale_suite.hpp"
#include "core/motion/processing/histories.hpp"
#include "core/motion/spectra/response_spectrum.hpp"
#include "io/digest.hpp"

namespace pilotis {

namespace {

constexpr int finer = 8;

std::vector<MatchTarget> wanted(const MatchOptions& options, const FitTask& task) {
  std::vector<MatchTarget> targets;
  for (const TargetSpectrum& target : task.targets) {
    targets.push_back({target.damping(), task.periods, {}});
    for (const double period : task.periods)
      targets.back().pseudo_accelerations.push_back(options.level * target.acceleration(period));
  }
  return targets;
}

std::vector<double> spectrum_at(const Accelerogram& record, const std::vector<double>& periods, double damping,
                                const std::string& where) {
  std::vector<Oscillator> oscillators;
  for (const double period : periods) oscillators.push_back({period, damping});
  return pseudo_accelerations({&record, 1}, oscillators, where);
}

// Of least squares of the logarithms, over all periods and dampings.
double level_factor(const Accelerogram& record, const std::vector<MatchTarget>& targets, const std::string& where) {
  FitProblem problem{{{}}, {}, {}};
  for (const MatchTarget& target : targets) {
    const std::vector<double> spectrum = spectrum_at(record, target.periods, target.damping, where);
    problem.ordinates[0].insert(problem.ordinates[0].end(), spectrum.begin(), spectrum.end());
    problem.target.insert(problem.target.end(), target.pseudo_accelerations.begin(), target.pseudo_accelerations.end());
  }
  return scale_suite(problem, Factors::each_motion, 0, where).factors.front();
}

struct Deviation {
  double share = 0, period = 0;
};

Deviation largest_deviation(const Accelerogram& record, const TargetSpectrum& target, double level,
                            const std::vector<double>& periods, const std::string& where) {
  const std::vector<double> spectrum = spectrum_at(record, periods, target.damping(), where);
  Deviation largest;
  for (std::size_t i = 0; i < periods.size(); ++i) {
    const double share = std::abs(spectrum[i] / (level * target.acceleration(periods[i])) - 1);
    if (share > largest.share) largest = {share, periods[i]};
  }
  return largest;
}

MatchFit fit_of(const Accelerogram& record, const TargetSpectrum& target, const MatchOptions& options,
                const FitTask& task, const std::string& where) {
  const int fine = finer * (static_cast<int>(task.periods.size()) - 1) + 1;
  const Deviation at = largest_deviation(record, target, options.level, task.periods, where);
  const Deviation between =
      largest_deviation(record, target, options.level, period_grid(task.from, task.to, fine, where), where);
  return {at.share, at.period, between.share, between.period};
}

EndOfGround end_of(const Accelerogram& record) {
  return {velocity_history(record).back(), displacement_history(record).back()};
}

std::string command_text(const MatchedRecord& record, const MatchOptions& options, const FitTask& task) {
  const FitOptions& fit = options.fit;
  std::string text = fmt::format("pilotis fit match \"{}\" {} --damping", record.file,
                                 target_text(fit.target, fit.dampings.front(), fit.command));
  for (const double damping : fit.dampings) text += fmt::format(" {}", damping);
  text +=
      fmt::format(" --from \"{} s\" --to \"{} s\" --periods {} --tolerance {} --iterations {} --level {}", task.from,
                  task.to, task.periods.size(), options.settings.tolerance, options.settings.iterations, options.level);
  if (options.unscaled) text += " --unscaled";
  if (!fit.units.empty()) text += fmt::format(" --units \"{}\"", fit.units);
  if (task.hints.step) text += fmt::format(" --step \"{} s\"", *task.hints.step);
  return text;
}

}  // namespace

MatchedRecord match_file(const std::string& file, const MatchOptions& options, const FitTask& task) {
  MatchedRecord result;
  result.file = file;
  result.given = read_record(file, task.hints).record;
  result.digest = digest_of(result.given);
  const std::vector<MatchTarget> targets = wanted(options, task);
  result.factor = options.unscaled ? 1 : level_factor(result.given, targets, file);
  Accelerogram scaled = result.given;
  for (double& sample : scaled.samples) sample *= result.factor;
  Match match = matched(scaled, targets, options.settings, file);
  result.record = std::move(match.record);
  round_samples(result.record, matched_decimals);
  result.iterations = match.iterations;
  result.within_tolerance = true;
  for (const TargetSpectrum& target : task.targets) {
    result.fits.push_back(fit_of(result.record, target, options, task, file));
    result.within_tolerance &= result.fits.back().at_matched <= options.settings.tolerance * (1 + 1e-6);  // rounding
  }
  result.end_given = end_of(scaled);
  result.end_matched = end_of(result.record);
  return result;
}

std::string fit_text(const MatchFit& fit, double damping) {
  return fmt::format(
      "damping {:g} %: off by at most {:.2f} % at the matched periods ({:.4g} s), {:.2f} % between them "
      "({:.4g} s)",
      100 * damping, 100 * fit.at_matched, fit.at_matched_period, 100 * fit.between, fit.between_period);
}

std::vector<std::string> remarks_of(const MatchedRecord& record, const MatchOptions& options, const FitTask& task) {
  std::vector<std::string> remarks{
      "ground motion matched to a target spectrum by wavelets added in the time domain",
      fmt::format("pilotis {}", PILOTIS_VERSION), command_text(record, options, task),
      fmt::format("record given: {}, SHA-256 of step, first sample time and samples {}", record.file, record.digest)};
  for (const TargetSpectrum& target : task.targets)
    remarks.push_back(fmt::format("target{}: {}", options.level == 1 ? "" : fmt::format(", times {}", options.level),
                                  target.description()));
  remarks.push_back(fmt::format("factor before matching: {}", record.factor));
  remarks.push_back(fmt::format("{} iterations; {} periods from {:.6g} to {:.6g} s", record.iterations,
                                task.periods.size(), task.from, task.to));
  for (std::size_t i = 0; i < record.fits.size(); ++i)
    remarks.push_back(fit_text(record.fits[i], task.targets[i].damping()));
  if (!record.within_tolerance)
    remarks.push_back(fmt::format("NOT WITHIN THE TOLERANCE of {:g} %", 100 * options.settings.tolerance));
  remarks.push_back(fmt::format(
      "when the ground has stopped: velocity {:.3g} m/s, displacement {:.3g} m; the record given, times the factor: "
      "{:.3g} m/s, {:.3g} m",
      record.end_matched.velocity, record.end_matched.displacement, record.end_given.velocity,
      record.end_given.displacement));
  return remarks;
}

}  // namespace pilotis
