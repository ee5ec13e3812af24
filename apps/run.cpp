// `pilotis run`: the main job. A study through all its motions to a result file and a verdict.
#include <fmt/chrono.h>
#include <fmt/format.h>
#include <unistd.h>

#include <csignal>
#include <cstdio>
#include <ctime>
#include <map>
#include <memory>

#include "apps/commands.hpp"
#include "apps/engine.hpp"
#include "apps/profile.hpp"
#include "apps/progress.hpp"
#include "apps/report_json.hpp"
#include "core/error.hpp"
#include "core/verdict/memory_table.hpp"
#include "integrators/catalogue.hpp"
#include "io/results/store.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

namespace {

struct Options {
  std::string study, output;
  bool json = false, quiet = false;
};

volatile std::sig_atomic_t interrupted = 0;
void interrupt(int) { interrupted = 1; }

// Ctrl-C and a polite kill ask for a stop after the run in hand, while this lives.
class InterruptWatch {
 public:
  InterruptWatch() : on_int_(std::signal(SIGINT, interrupt)), on_term_(std::signal(SIGTERM, interrupt)) {}
  ~InterruptWatch() {
    std::signal(SIGINT, on_int_);
    std::signal(SIGTERM, on_term_);
  }
  InterruptWatch(const InterruptWatch&) = delete;
  InterruptWatch& operator=(const InterruptWatch&) = delete;

 private:
  void (*on_int_)(int);
  void (*on_term_)(int);
};

std::filesystem::path output_of(const Options& options) {
  if (!options.output.empty()) return options.output;
  return std::filesystem::path(options.study).stem().string() + ".h5";
}

StoredStudy stored(const Study& study, StudyResults results) {
  const auto now = fmt::format("{:%Y-%m-%dT%H:%M:%SZ}", fmt::gmtime(std::time(nullptr)));
  StudyHeader header{study.title, study.text,   study.file.string(),          PILOTIS_VERSION,           now,
                     study.units, study.limits, std::move(results.buildings), std::move(results.motions)};
  return {std::move(header), std::move(results.runs)};
}

// What the user should know beside the result: the reader's assumptions, why each step, runs that ended early.
void print_notes(const Study& study, const StudyResults& results) {
  for (const std::string& note : study.notes) fmt::print(stderr, "note: {}\n", note);
  std::map<std::string, int> choices;
  for (const RunResult& run : results.runs) ++choices[run.step_choice];
  for (const auto& [why, runs] : choices)
    fmt::print(stderr, "step{}: {}\n", choices.size() > 1 ? fmt::format(" of {} runs", runs) : "", why);
  for (const RunResult& run : results.runs)
    if (!run.status_note.empty())
      fmt::print(stderr, "{} at factor {:g}: {}\n", run.motion, run.factor, run.status_note);
}

StudyRun marched(const Study& study, bool quiet) {
  Progress progress(isatty(STDERR_FILENO) != 0, quiet);
  const InterruptWatch watch;
  StudyRun run = run_study(study, [&](long done, long all) {
    progress.show(done, all);
    return interrupted == 0;
  });
  progress.finish();
  return run;
}

int run_to_verdict(const Options& options) {
  const Study study = read_study(options.study, scheme_catalogue());
  const std::filesystem::path output = output_of(options);
  { const WholeFile writable(output); }  // better known before the march than after it
  StudyRun run = marched(study, options.quiet);
  if (run.stopped) {
    fmt::print(
        stderr,
        "pilotis: stopped after {} of {} runs; nothing was written; start the same command again to run them all\n",
        run.results.runs.size(), run_count(study));
    return not_completed;
  }
  if (!options.quiet) print_notes(study, run.results);
  const StoredStudy result = stored(study, std::move(run.results));
  const Verdict verdict = write_results(output, result);
  const MemoryTable table(result.buildings, result.runs);
  if (options.json)
    write_report_json(result, table, verdict, print_out);
  else
    print_out(profile_text(result, table, verdict, screen_style(stdout)));
  if (!options.quiet) fmt::print(stderr, "results: {}\n", output.string());
  return exit_status(verdict);
}

}  // namespace

void add_run(CLI::App& app, int& status) {
  const auto options = std::make_shared<Options>();
  CLI::App* command =
      app.add_subcommand("run", "March a study's building through its motions, to a result file and a verdict");
  command->add_option("study", options->study, "study file (TOML)")->required();
  command->add_option("-o,--output", options->output,
                      "result file (HDF5); the study's name with .h5 in this folder unless given");
  command->add_flag("--json", options->json, "print JSON, in SI units");
  command->add_flag("-q,--quiet", options->quiet, "no progress and no notes on standard error");
  command->footer(
      "Exit status: 0 every limit holds; 1 a limit is exceeded or a run collapsed; 2 the input is wrong; 3 a run was "
      "not\n"
      "completed; 4 something outside failed (disk, permission).\n\n"
      "Example:\n  pilotis run data-demo/study.toml -o demo.h5");
  command->callback([options, &status] { status = run_to_verdict(*options); });
}

}  // namespace pilotis
