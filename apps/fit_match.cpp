// pilotis fit match: changes records by wavelets until their spectra follow a target.
#include <fmt/format.h>
#include <tbb/parallel_for.h>
#include <unistd.h>

#include <algorithm>
#include <atomic>
#include <cmath>
#include <exception>
#include <filesystem>
#include <memory>
#include <mutex>
#include <set>

#include "apps/commands.hpp"
#include "apps/fit_commands.hpp"
#include "apps/fit_matching.hpp"
#include "apps/fit_report.hpp"
#include "apps/progress.hpp"
#include "apps/record_csv.hpp"
#include "apps/text_table.hpp"

namespace pilotis {

namespace {

namespace fs = std::filesystem;
using Json = nlohmann::ordered_json;

// Each component of a pair is matched by itself.
std::vector<std::string> files_of(const FitTask& task) {
  std::vector<std::string> files;
  for (const FitMotion& motion : task.motions) files.insert(files.end(), motion.files.begin(), motion.files.end());
  return files;
}

// One record goes into the file named, several into a folder, "quay-01-matched.csv" each.
std::vector<fs::path> outputs_of(const std::vector<std::string>& files, const std::string& output) {
  if (files.size() == 1) return {output};
  std::vector<fs::path> paths;
  std::set<fs::path> seen;
  for (const std::string& file : files) {
    paths.push_back(fs::path(output) / (fs::path(file).stem().string() + "-matched.csv"));
    if (!seen.insert(paths.back()).second)
      throw input_error("fit match --output",
                        fmt::format("two records would be written to \"{}\"", paths.back().string()),
                        "records matched together need different names");
  }
  std::error_code failed;
  fs::create_directory(output, failed);
  if (!fs::is_directory(output, failed))
    throw input_error("fit match --output", fmt::format("found \"{}\" for {} records", output, files.size()),
                      "the name of a folder, or of one that can be made, is needed");
  return paths;
}

// Side by side; of several errors the first record's is thrown.
std::vector<MatchedRecord> match_all(const std::vector<std::string>& files, const MatchOptions& options,
                                     const FitTask& task) {
  std::vector<MatchedRecord> records(files.size());
  std::vector<std::exception_ptr> errors(files.size());
  Progress progress(isatty(STDERR_FILENO) != 0, false, 0, "records");
  std::atomic<long> done = 0;
  std::mutex one_at_a_time;
  tbb::parallel_for(std::size_t{0}, files.size(), [&](std::size_t i) {
    try {
      records[i] = match_file(files[i], options, task);
    } catch (...) {
      errors[i] = std::current_exception();
    }
    const long now = ++done;
    if (const std::unique_lock lock(one_at_a_time, std::try_to_lock); lock)
      progress.show(static_cast<double>(now), static_cast<long>(files.size()));
  });
  progress.finish();
  for (const std::exception_ptr& error : errors)
    if (error) std::rethrow_exception(error);
  return records;
}

// Spectra of each motion, its components taken together as they were offered.
std::vector<std::vector<double>> spectra_of_motions(const FitTask& task, const std::vector<MatchedRecord>& records,
                                                    Accelerogram MatchedRecord::*which) {
  const std::vector<Oscillator> oscillators = wanted_oscillators(task);
  std::vector<std::vector<double>> spectra;
  std::size_t next = 0;
  for (const FitMotion& motion : task.motions) {
    std::vector<Accelerogram> components;
    std::size_t longest = 0;
    for (std::size_t i = 0; i < motion.files.size(); ++i, ++next) {
      components.push_back(records[next].*which);
      longest = std::max(longest, components.back().samples.size());
    }
    for (Accelerogram& component : components) component.samples.resize(longest, 0.0);  // at rest
    spectra.push_back(pseudo_accelerations(components, oscillators, motion.name));
  }
  return spectra;
}

FitReport report_of(const FitTask& task, const std::vector<MatchedRecord>& records) {
  FitReport report;
  const bool one = task.motions.size() == 1;
  report.before_name = one ? "as given" : fmt::format("mean of {} as given", task.motions.size());
  report.after_name = one ? "matched" : fmt::format("mean of {} matched", task.motions.size());
  const SpectrumParts before = parts_of(mean_of(spectra_of_motions(task, records, &MatchedRecord::given)), task);
  report.before = before.fitted;
  report.shown_before = before.shown;
  SuiteSpectra code{task.code.periods, {}};
  for (const std::vector<double>& spectrum : spectra_of_motions(task, records, &MatchedRecord::record)) {
    SpectrumParts parts = parts_of(spectrum, task);
    report.names.push_back(task.motions[report.each.size()].name);
    report.each.push_back(std::move(parts.fitted));
    report.shown_each.push_back(std::move(parts.shown));
    code.accelerations.push_back(std::move(parts.code));
  }
  report.after = mean_of(report.each);
  report.shown_after = mean_of(report.shown_each);
  std::vector<double> peaks;
  for (const MatchedRecord& record : records) peaks.push_back(std::abs(peak_of(record.record).value));
  if (task.code.findings) report.findings = task.code.findings(code, peaks);
  return report;
}

std::string records_text(const MatchOptions& options, const FitTask& task, const std::vector<MatchedRecord>& records,
                         const std::vector<fs::path>& outputs) {
  std::string text = fmt::format("target: {}\n", task_text(task));
  if (options.level != 1) text += fmt::format("matched: {:g} times the target\n", options.level);
  for (std::size_t i = 0; i < records.size(); ++i) {
    const MatchedRecord& record = records[i];
    text += fmt::format("\n{} -> {}\n  factor {:.4f} before matching, {} iterations{}\n", record.file,
                        outputs[i].string(), record.factor, record.iterations,
                        record.within_tolerance
                            ? ""
                            : fmt::format("; NOT WITHIN THE TOLERANCE of {:g} %", 100 * options.settings.tolerance));
    for (std::size_t k = 0; k < record.fits.size(); ++k)
      text += fmt::format("  {}\n", fit_text(record.fits[k], task.targets[k].damping()));
    text += fmt::format("  the ground stops at {:.3g} m/s, {:.3g} m (given: {:.3g} m/s, {:.3g} m)\n",
                        record.end_matched.velocity, record.end_matched.displacement, record.end_given.velocity,
                        record.end_given.displacement);
  }
  return text;
}

Json json_of(const MatchOptions& options, const FitTask& task, const std::vector<MatchedRecord>& records,
             const std::vector<fs::path>& outputs, const FitReport& report) {
  Json json{{"command", options.fit.command}};
  json.update(report_json(report, task));
  json["level"] = options.level;
  json["tolerance"] = options.settings.tolerance;
  json["records"] = Json::array();
  for (std::size_t i = 0; i < records.size(); ++i) {
    const MatchedRecord& record = records[i];
    Json fits = Json::array();
    for (std::size_t k = 0; k < record.fits.size(); ++k)
      fits.push_back({{"damping_ratio", task.targets[k].damping()},
                      {"deviation_at_matched_periods", record.fits[k].at_matched},
                      {"deviation_between", record.fits[k].between}});
    json["records"].push_back({{"file", record.file},
                               {"output", outputs[i].string()},
                               {"factor", record.factor},
                               {"iterations", record.iterations},
                               {"within_tolerance", record.within_tolerance},
                               {"fits", fits},
                               {"end_velocity_m_per_s", record.end_matched.velocity},
                               {"end_displacement_m", record.end_matched.displacement}});
  }
  return json;
}

void print_text(const MatchOptions& options, const FitTask& task, const std::vector<MatchedRecord>& records,
                const std::vector<fs::path>& outputs, const FitReport& report) {
  std::string text = records_text(options, task, records, outputs);
  text += fmt::format("\nPseudo-acceleration, damping {:g} %{}:\n\n{}", 100 * task.targets[0].damping(),
                      task.motions.front().is_pair() ? ", RotD100 of each pair" : "", spectra_text(report, task));
  if (!report.findings.empty()) text += "\n" + findings_text(report.findings, screen_style(stdout));
  print_out(text);
}

void match(const MatchOptions& options, int& status) {
  const FitTask task = task_of(options.fit);
  const std::vector<std::string> files = files_of(task);
  const std::vector<MatchedRecord> records = match_all(files, options, task);
  const std::vector<fs::path> outputs = outputs_of(files, options.output);
  for (std::size_t i = 0; i < records.size(); ++i)
    write_text_file(outputs[i], record_csv(records[i].record, remarks_of(records[i], options, task), matched_decimals),
                    "fit match --output");
  const FitReport report = report_of(task, records);
  write_files(options.fit, report, task,
              fmt::format("{} matched to a target spectrum", records.size() == 1 ? files[0] : "records"));
  if (options.fit.json)
    print_out(json_of(options, task, records, outputs, report).dump(2) + "\n");
  else
    print_text(options, task, records, outputs, report);
  const bool all_within =
      std::all_of(records.begin(), records.end(), [](const MatchedRecord& r) { return r.within_tolerance; });
  status = all_within && !any_fails(report.findings) ? all_hold : limit_exceeded;
}

}  // namespace

void add_fit_match(CLI::App& fit, int& status) {
  const auto options = std::make_shared<MatchOptions>();
  CLI::App* command = fit.add_subcommand("match", "changes records by wavelets until their spectra follow a target");
  add_fit_options(*command, options->fit);
  command->add_option("-o,--output", options->output, "CSV file to write; for several records a folder")->required();
  command
      ->add_option("--tolerance", options->settings.tolerance,
                   "largest deviation at a matched period, as a share of the target [0.05]")
      ->check(CLI::Range(1e-9, 1.0));
  command->add_option("--iterations", options->settings.iterations, "how many at most [30]")
      ->check(CLI::Range(1, 10000));
  command->add_option("--level", options->level, "matches this many times the target, e.g. 1.1 [1]")
      ->check(CLI::Range(1e-6, 1e6));
  command->add_flag("--unscaled", options->unscaled, "does not scale a record to the target's level first");
  command->footer(
      "Velocity and displacement end as those of the record given. Each component of a pair is matched by itself.\n"
      "Exit status 1: the best of all iterations is written, but not within the tolerance; or a clause does not "
      "hold.\n\n"
      "Example:\n"
      "  pilotis fit match data-demo/motions/quay-01.csv --target en_1998 --ag \"0.3 g\" --type 1 --ground B --from "
      "0.1 "
      "--to 2 -o matched.csv --svg matched.svg");
  command->callback([options, &status] { match(*options, status); });
}

}  // namespace pilotis
