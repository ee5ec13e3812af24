// `pilotis run`: the main job. A study through all its runs, from one to millions, to a result file and a verdict.
#include <fmt/format.h>

#include <cstdio>
#include <map>
#include <memory>
#include <thread>

#include "apps/batch/dry.hpp"
#include "apps/batch/run_batch.hpp"
#include "apps/commands.hpp"
#include "apps/profile.hpp"
#include "apps/report_json.hpp"
#include "core/error.hpp"
#include "core/lanes/instruction_set.hpp"
#include "integrators/catalogue.hpp"
#include "io/results/result_table.hpp"
#include "io/results/shard_folder.hpp"

namespace pilotis {

namespace {

struct Options {
  std::string study, output, log;
  int threads = 0;  // 0: all cores
  bool json = false, quiet = false, dry = false;
};

std::filesystem::path output_of(const Options& options) {
  if (!options.output.empty()) return options.output;
  return std::filesystem::path(options.study).stem().string() + ".h5";
}

int threads_of(const Options& options) {
  return options.threads > 0 ? options.threads : std::max(1U, std::thread::hardware_concurrency());
}

// What the user should know beside the result: why each step, runs that ended early.
void print_notes(const RunTable& table) {
  constexpr std::size_t block = 4096, most_told = 20;
  std::map<std::string, std::size_t> choices;
  std::size_t ended_early = 0;
  for (std::size_t first = 0; first < table.runs(); first += block)
    for (const RunResult& run : table.rows(first, std::min(block, table.runs() - first), RowParts::heads)) {
      ++choices[run.step_choice];
      if (run.status_note.empty() || ++ended_early > most_told) continue;
      const std::string of = table.buildings().size() > 1 ? " of " + table.buildings()[run.building].name : "";
      fmt::print(stderr, "{}{} at factor {:g}: {}\n", run.motion, of, run.factor, run.status_note);
    }
  if (ended_early > most_told)
    fmt::print(stderr, "and {} more runs that ended early: /runs/status_note in the result file\n",
               ended_early - most_told);
  std::size_t told = 0;
  for (const auto& [why, runs] : choices) {
    if (++told > most_told) break;
    fmt::print(stderr, "step{}: {}\n", choices.size() > 1 ? fmt::format(" of {} runs", runs) : "", why);
  }
}

std::string duration_text(double seconds) {
  if (seconds < 1) return "under 1 s";
  if (seconds < 120) return fmt::format("about {:.0f} s", seconds);
  if (seconds < 7200) return fmt::format("about {:.0f} min", seconds / 60);
  return fmt::format("about {:.1f} h", seconds / 3600);
}

std::string size_text(double bytes) {
  const char* units[] = {"B", "kB", "MB", "GB", "TB"};
  int unit = 0;
  for (; bytes >= 1000 && unit < 4; ++unit) bytes /= 1000;
  return fmt::format("{:.3g} {}", bytes, units[unit]);
}

void print_dry(const Options& options, const BatchPlan& plan) {
  const Study& study = plan.study();
  const int threads = threads_of(options);
  const BatchEstimate found = estimate(plan, threads);
  const std::size_t smallest = plan.shards().back().count, largest = plan.shards().front().count;
  fmt::print("runs:          {} (buildings {} x motions {} x factors {})\n", plan.runs(), study.buildings.size(),
             std::max<std::size_t>(1, study.motions.size()), study.motions.empty() ? 1 : study.factors.size());
  fmt::print("shards:        {} of {} runs{}\n", plan.shards().size(),
             smallest == largest ? fmt::format("{}", largest) : fmt::format("{} to {}", smallest, largest),
             plan.saves_shards() ? ", each kept on disk as it is done" : ", not kept on disk: over in seconds");
  fmt::print("work:          {:.3g} story-steps{}\n", plan.story_steps(),
             study.march.error_check ? ", the error checks at half the step included" : "");
  fmt::print("time:          {} on {} thread{} of this machine ({}), from a short march of the first building\n",
             duration_text(found.seconds), threads, threads == 1 ? "" : "s", name_of(chosen_instruction_set()));
  fmt::print("size on disk:  {} in {}", size_text(found.peak_bytes), output_of(options).string());
  if (found.history_bytes > 0) fmt::print(", and histories of {} before compression", size_text(found.history_bytes));
  fmt::print("\n");
}

// What was asked of a batch that was stopped, for whoever asked.
int tell_stopped(const BatchEnd& end, const BatchPlan& plan) {
  if (!end.goes_on)
    fmt::print(stderr, "pilotis: stopped; nothing was written; start the same command again to march all {} runs\n",
               plan.runs());
  else
    fmt::print(stderr,
               "pilotis: stopped; {} of {} shards ({} of {} runs) are whole and kept in {}; start the same command "
               "again to go on from there\n",
               end.shards_kept, plan.shards().size(), end.runs_kept, plan.runs(), end.folder.string());
  return not_completed;
}

int tell_result(const Options& options) {
  const ResultTable table(output_of(options));
  const Verdict verdict = judge(table, table.header().limits);
  if (!options.quiet) print_notes(table);
  if (options.json)
    write_report_json(table.header(), table, verdict, print_out);
  else
    print_out(profile_text(table.header(), table, verdict, screen_style(stdout)));
  if (!options.quiet) fmt::print(stderr, "results: {}\n", output_of(options).string());
  return exit_status(verdict);
}

int run_to_verdict(const Options& options) {
  const Study study = read_study(options.study, scheme_catalogue());
  const BatchPlan plan(study);
  if (options.dry) return print_dry(options, plan), 0;
  const std::unique_ptr<Job> job = make_job();
  const BatchOptions batch{output_of(options), options.log, threads_of(options), options.quiet};
  try {
    if (!options.quiet && job->rank() == 0)
      for (const std::string& note : study.notes) fmt::print(stderr, "note: {}\n", note);
    const BatchEnd end = run_batch(plan, batch, *job);
    if (job->rank() != 0) return end.whole ? 0 : static_cast<int>(not_completed);
    if (!end.whole) return tell_stopped(end, plan);
    if (end.shards_found > 0 && !options.quiet)
      fmt::print(stderr, "note: {} of {} shards were there from an earlier start\n", end.shards_found,
                 plan.shards().size());
    return tell_result(options);
  } catch (const Error& error) {
    const std::size_t kept = error.kind() == ErrorKind::outside ? shards_beside(batch.output) : 0;
    if (kept > 0)
      fmt::print(stderr, "pilotis: {} of {} shards are kept in {}; start the same command again to go on from there\n",
                 kept, plan.shards().size(), ShardFolder::beside(batch.output).string());
    if (job->ranks() > 1) {
      fmt::print(stderr, "pilotis: {}\n", error.what());
      job->give_up(exit_status_of(error));
    }
    throw;
  }
}

}  // namespace

void add_run(CLI::App& app, int& status) {
  const auto options = std::make_shared<Options>();
  CLI::App* command =
      app.add_subcommand("run", "March a study's buildings through its motions, to a result file and a verdict");
  command->add_option("study", options->study, "study file (TOML)")->required();
  command->add_option("-o,--output", options->output,
                      "result file (HDF5); the study's name with .h5 in this folder unless given");
  command->add_option("-t,--threads", options->threads, "threads that march, in each process; all cores unless given")
      ->check(CLI::Range(1, 4096));
  command->add_flag("--dry", options->dry, "only tell how many runs and shards, and about how long and how large");
  command->add_option("--log", options->log, "append one line of JSON for each shard to this file");
  command->add_flag("--json", options->json, "print JSON, in SI units");
  command->add_flag("-q,--quiet", options->quiet, "no progress and no notes on standard error");
  command->footer(
      "A long study is cut into shards that are kept in OUTPUT.shards as they are done. After a crash or Ctrl-C the\n"
      "same command goes on from there; a study that was changed meanwhile is refused. Under mpirun or a scheduler "
      "the\n"
      "ranks share the shards: see apps/CLUSTER.md.\n\n"
      "Exit status: 0 every limit holds; 1 a limit is exceeded or a run collapsed; 2 the input is wrong; 3 a run was "
      "not\n"
      "completed; 4 something outside failed (disk, permission).\n\n"
      "Example:\n  pilotis run data-demo/study.toml -o demo.h5");
  command->callback([options, &status] { status = run_to_verdict(*options); });
}

}  // namespace pilotis
