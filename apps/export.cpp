// `pilotis export`: parts of a result file as CSV.
#include <fmt/format.h>

#include <algorithm>
#include <functional>
#include <memory>
#include <optional>

#include "apps/commands.hpp"
#include "apps/export_tables.hpp"
#include "apps/terminal.hpp"
#include "core/error.hpp"
#include "io/results/result_table.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

namespace {

struct Options {
  std::string file, output, part;
  long run = -1;
  bool study_units = false;
};

constexpr const char* parts[][2] = {{"--peaks", "largest responses of every run, with step error and time"},
                                    {"--residual", "drift left after the motion"},
                                    {"--histories", "responses over time, of the runs that kept them"},
                                    {"--runs", "status, step, energies of every run"},
                                    {"--motions", "the motions of the suite"},
                                    {"--building", "heights, masses, modes"}};

// Standard output, or a file that is whole or untouched.
class Output {
 public:
  explicit Output(const std::string& file) {
    if (!file.empty()) file_.emplace(file);
  }
  void write(const std::string& text) { file_ ? file_->write(text) : print_out(text); }
  void finish() {
    if (file_) file_->commit();
  }

 private:
  std::optional<WholeFile> file_;
};

[[noreturn]] void no_histories(const Options& options) {
  const std::string which = options.run < 0 ? "no run" : fmt::format("run {}", options.run);
  throw input_error(options.file, fmt::format("{} kept {}histories", which, options.run < 0 ? "" : "no "),
                    "name them in the study, [keep] histories = [\"drift\"] or \"all\", and run it again");
}

using Rows = std::function<std::string(const NumberedRun&, const TableUnits&)>;

NumberedRun numbered(const ResultTable& table, const RunResult& run, std::size_t number) {
  return {run, number, table.buildings().at(static_cast<std::size_t>(run.building))};
}

// The runs asked for, a few at a time.
void write_runs(const ResultTable& table, const Options& options, const TableUnits& units, RowParts parts,
                const Rows& rows, Output& output) {
  constexpr std::size_t at_once = 128;
  const std::size_t from = options.run < 0 ? 0 : static_cast<std::size_t>(options.run);
  const std::size_t to = options.run < 0 ? table.runs() : from + 1;
  for (std::size_t first = from; first < to; first += at_once) {
    const std::vector<RunResult> runs = table.rows(first, std::min(at_once, to - first), parts);
    for (std::size_t i = 0; i < runs.size(); ++i) output.write(rows(numbered(table, runs[i], first + i), units));
  }
}

void write_histories(const ResultTable& table, const Options& options, const TableUnits& units, Output& output) {
  const std::size_t from = options.run < 0 ? 0 : static_cast<std::size_t>(options.run);
  const std::size_t to = options.run < 0 ? table.runs() : from + 1;
  bool any = false;
  for (std::size_t i = from; i < to; ++i) {
    if (!table.keeps_histories(i)) continue;
    const RunResult run = table.with_histories(i);
    if (!any) output.write(history_header());
    any = true;
    output.write(history_rows(numbered(table, run, i), units));
  }
  if (!any) no_histories(options);
}

void write_buildings(const ResultTable& table, const TableUnits& units, Output& output) {
  output.write(building_header());
  for (const BuildingSummary& building : table.buildings()) output.write(building_rows(building, units));
}

void require_run(const ResultTable& table, const Options& options) {
  const auto runs = static_cast<long>(table.runs());
  if (options.run >= runs)
    throw input_error("--run", fmt::format("found {}, and {} has {} runs", options.run, options.file, runs),
                      fmt::format("runs are counted from 0 to {}", runs - 1));
  if (options.run >= 0 && (options.part == "--motions" || options.part == "--building"))
    throw input_error("--run", fmt::format("does not go with {}", options.part), "leave it out");
}

void write_part(const ResultTable& table, const Options& options, Output& output) {
  const TableUnits units(options.study_units, table.header().units);
  if (options.part == "--peaks") {
    output.write(peaks_header());
    write_runs(table, options, units, RowParts::all, peaks_rows, output);
  } else if (options.part == "--residual") {
    output.write(residuals_header(units));
    write_runs(table, options, units, RowParts::residuals, residuals_rows, output);
  } else if (options.part == "--runs") {
    output.write(runs_header(units));
    write_runs(table, options, units, RowParts::heads, runs_rows, output);
  } else if (options.part == "--histories") {
    write_histories(table, options, units, output);
  } else if (options.part == "--motions") {
    output.write(motions_csv(table.header().motions, units));
  } else {
    write_buildings(table, units, output);
  }
}

void export_part(const Options& options) {
  const ResultTable table(options.file);
  require_run(table, options);
  Output output(options.output);
  write_part(table, options, output);
  output.finish();
}

}  // namespace

void add_export(CLI::App& app, int& status) {
  auto options = std::make_shared<Options>();
  CLI::App* command = app.add_subcommand("export", "Write a part of a result file as CSV");
  command->add_option("file", options->file, "result file (HDF5) that `pilotis run` wrote")->required();
  CLI::Option_group* group = command->add_option_group("part", "what to write");
  for (const auto& [name, meaning] : parts)
    group->add_flag_callback(
        name, [options, name = std::string(name)] { options->part = name; }, meaning);
  group->require_option(1);
  command->add_option("--run", options->run, "only this run, counted from 0")->check(CLI::NonNegativeNumber);
  command->add_option("-o,--output", options->output, "file to write; standard output without it");
  command->add_flag("--study-units", options->study_units, "in the units of the study instead of SI");
  command->footer(
      "One value per row, with its unit; a cell is empty where nothing is known.\n\n"
      "Example:\n  pilotis export harbor-clinic.h5 --peaks --study-units -o peaks.csv");
  command->callback([options, &status] {
    export_part(*options);
    status = all_hold;
  });
}

}  // namespace pilotis
