// `pilotis motion`: measures, spectra and pictures of records.
#include <fmt/format.h>

#include <cstdio>
#include <memory>
#include <thread>

#include "apps/commands.hpp"
#include "apps/motion/charts.hpp"
#include "apps/motion/gather.hpp"
#include "apps/motion/names.hpp"
#include "apps/motion/text.hpp"
#include "apps/plot/screen.hpp"
#include "apps/plot/svg.hpp"
#include "apps/typed_values.hpp"
#include "core/error.hpp"

namespace pilotis {

namespace {

struct Options {
  std::vector<std::string> files;
  std::string measures = "all", periods, damping = "0.05", inelastic;  // as typed
  std::string unit, step, first_sample_at;                             // of records that do not say
  std::string component;                                               // of files that hold several; empty: all
  std::string csv, svg;                                                // files
  bool list = false, spectrum = false, histories = false, fourier = false, rotd = false;
  bool plot = false, no_plot = false, json = false, quiet = false;
  int threads = 0;  // 0: all cores
};

RecordHints hints_of(const Options& options) {
  RecordHints hints;
  if (!options.unit.empty()) {
    si_factor(options.unit, Dimension::acceleration, "motion --units");
    hints.unit = options.unit;
  }
  if (!options.component.empty()) hints.component = options.component;
  if (!options.step.empty()) hints.step = typed_quantity(options.step, Dimension::time, "motion --step");
  if (hints.step && !(*hints.step > 0))
    throw input_error("motion --step", fmt::format("found \"{}\"", options.step), "a time above 0 is needed");
  if (!options.first_sample_at.empty())
    hints.first_sample_at = typed_quantity(options.first_sample_at, Dimension::time, "motion --first-sample-at");
  return hints;
}

MotionRequest request_of(const Options& options) {
  MotionRequest request;
  request.measures = measures_typed(options.measures);
  request.periods = options.periods.empty() ? standard_periods() : periods_typed(options.periods);
  request.damping_ratios = damping_typed(options.damping);
  request.spectrum = options.spectrum;
  request.histories = options.histories;
  request.fourier = options.fourier;
  if (!options.inelastic.empty()) request.inelastic = inelastic_typed(options.inelastic);
  return request;
}

// Pictures on the screen: of one record without being asked.
bool draws(const Options& options, std::size_t files) {
  return !options.json && !options.no_plot && (options.plot || files == 1);
}

GatherOptions gather_options(const Options& options) {
  GatherOptions gather{files_meant(options.files), hints_of(options), request_of(options), {}, options.csv};
  gather.pair = options.rotd;
  gather.json = options.json;
  gather.quiet = options.quiet;
  gather.threads = options.threads;
  if (gather.threads == 0) gather.threads = static_cast<int>(std::max(1U, std::thread::hardware_concurrency()));
  gather.told = gather.computed;
  gather.pictures = draws(options, gather.files.size()) || !options.svg.empty();
  gather.computed.spectrum |= gather.pictures;
  gather.computed.histories |= gather.pictures && gather.files.size() <= most_drawn_apart;
  gather.computed.samples = options.rotd;
  return gather;
}

void print_charts(const std::vector<std::vector<Chart>>& rows, const ScreenStyle& style) {
  constexpr int history_rows = 7, tall_rows = 15;
  for (const std::vector<Chart>& row : rows)
    for (const Chart& chart : row) print_out("\n" + chart_text(chart, chart.tall ? tall_rows : history_rows, style));
}

// Each how many periods of the usual grid stand in a table on the screen: about twenty lines of it. Periods that were
// asked for stand there all.
std::size_t table_stride(const Options& options, const MotionRequest& request) {
  if (!options.periods.empty()) return 1;
  const std::size_t stride = 10;
  if (!options.quiet && (options.spectrum || request.inelastic || options.rotd))
    fmt::print(stderr, "note: tables show every {}th of {} periods; --csv has all, --periods picks others\n", stride,
               request.periods.size());
  return stride;
}

void print_tables(const Options& options, const MotionRequest& request, const Gathered& gathered) {
  const std::size_t stride = table_stride(options, request);
  const std::vector<std::string> names = shown_names(gathered.records);
  for (std::size_t r = 0; r < names.size(); ++r) {
    if (options.spectrum) print_out("\n" + spectrum_table(gathered.records[r], names[r], stride));
    if (request.inelastic) print_out("\n" + inelastic_table(gathered.records[r], names[r], *request.inelastic, stride));
  }
  if (!gathered.pair.spectra.empty()) print_out("\n" + pair_table(gathered.pair, stride));
}

void print_text(const Options& options, const GatherOptions& asked, const Gathered& gathered) {
  const ScreenStyle style = screen_style(stdout);
  const int width = is_terminal(stdout) ? style.width : 0;
  if (gathered.records.size() == 1)
    print_out(record_text(gathered.records[0], asked.told, width));
  else
    print_out(measures_table(gathered.records, asked.told, width));
  print_tables(options, asked.told, gathered);
  if (draws(options, asked.files.size()))
    print_charts(picture_rows(gathered.records, asked.told, gathered.pair), style);
}

void write_svg(const std::string& file, const GatherOptions& asked, const Gathered& gathered) {
  const std::vector<std::string> names = shown_names(gathered.records);
  const std::string title = names.size() == 1 ? names[0] : fmt::format("{} records", names.size());
  WholeFile whole(file);
  whole.write(svg_of(title, picture_rows(gathered.records, asked.told, gathered.pair)));
  whole.commit();
}

int motion(const Options& options) {
  if (options.list) return print_out(measures_list()), 0;
  if (options.files.empty())
    throw input_error("motion", "no record is given", "files or patterns are needed, or --list");
  const GatherOptions asked = gather_options(options);
  const Gathered gathered = gather(asked);
  if (gathered.stopped) {
    fmt::print(stderr, "pilotis: stopped; no file was written\n");
    return not_completed;
  }
  if (!options.svg.empty() && !gathered.records.empty()) write_svg(options.svg, asked, gathered);
  if (!options.json && !gathered.records.empty()) print_text(options, asked, gathered);
  if (!options.quiet) {
    for (const auto& file : gathered.csv_files) fmt::print(stderr, "written: {}\n", file.string());
    if (!options.svg.empty() && !gathered.records.empty()) fmt::print(stderr, "written: {}\n", options.svg);
  }
  return gathered.status;
}

void add_options(CLI::App& command, Options& options) {
  command.add_option("FILE", options.files, "records of ground motion; files or patterns such as \"motions/*.csv\"");
  command.add_flag("--list", options.list, "show every measure with its unit, definition and source");
  command.add_option("--measures", options.measures, "all, none, or names from --list, e.g. pga,arias [all]");
  command.add_option("--periods", options.periods,
                     "shortest:longest:count in equal ratios, e.g. 0.05:4:80, or a list, e.g. 0.2,0.5,1; s [0 and 200 "
                     "from 0.01 to 10 s]");
  command.add_option("--damping", options.damping, "damping ratios of the spectra, e.g. 0.02,0.05 or 2%,5% [0.05]");
  command.add_flag("--spectrum", options.spectrum, "tell the ordinates of the response spectrum");
  command.add_option("--inelastic", options.inelastic,
                     "spectrum of the bilinear oscillator: ductility=4, strength=\"0.2 g\" (yield force over mass) or "
                     "strength_ratio=0.25 (of the elastic strength); ,post_yield_ratio=0.03 may follow [0]");
  command.add_option("--component", options.component,
                     "name, azimuth or number of the component, where a file holds several; all unless given");
  command.add_flag("--rotd", options.rotd,
                   "RotD50 and RotD100 of two horizontal components: two files, or one that holds two");
  command.add_flag("--fourier", options.fourier, "Fourier amplitude spectrum: in pictures, --csv and --json");
  command.add_flag("--histories", options.histories, "acceleration, velocity and displacement into --csv and --json");
  command.add_flag("--plot", options.plot, "pictures on the screen, of several records too");
  command.add_flag("--no-plot", options.no_plot, "no pictures on the screen");
  command.add_option("--svg", options.svg, "write the pictures into this file");
  command.add_option("--csv", options.csv,
                     "write the measures into this file, and what else is asked for beside it: NAME-spectrum.csv, ...");
  command.add_flag("--json", options.json, "print JSON, numbers in SI");
  command.add_option("--units", options.unit, "acceleration unit of records that do not state it: g, m/s2, gal, ...");
  command.add_option("--step", options.step, "time step of records that do not state it, e.g. 0.01");
  command.add_option("--first-sample-at", options.first_sample_at, "time in s of the first sample: 0 or one step");
  command.add_option("-t,--threads", options.threads, "threads; all cores unless given")->check(CLI::Range(1, 4096));
  command.add_flag("-q,--quiet", options.quiet, "no progress and no notes on standard error");
}

}  // namespace

void add_motion(CLI::App& app, int& status) {
  CLI::App* command = app.add_subcommand("motion", "measures, spectra and pictures of records of ground motion");
  const auto options = std::make_shared<Options>();
  add_options(*command, *options);
  command->footer(
      "Accelerations are shown in g, all else in SI; CSV and JSON are in SI throughout. A file that cannot be used is "
      "told of,\nthe others are done, and the exit status is 2.\n\n"
      "Examples:\n  pilotis motion data-demo/motions/quay-01.csv\n"
      "  pilotis motion \"data-demo/motions/*.csv\" --svg motions.svg --csv motions.csv --spectrum\n"
      "  pilotis motion --rotd data-demo/motions/quay-01.csv data-demo/motions/quay-02.csv --periods 0.2,0.5,1,2\n"
      "  pilotis motion data-demo/motions/ridge-03.csv --inelastic ductility=4 --periods 0.1:3:30");
  command->callback([options, &status] { status = motion(*options); });
}

}  // namespace pilotis
