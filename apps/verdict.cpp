// `pilotis verdict`: limits against the results of an existing file.
#include <fmt/format.h>

#include <algorithm>
#include <cstdio>
#include <memory>

#include "apps/commands.hpp"
#include "apps/profile.hpp"
#include "apps/report_json.hpp"
#include "core/error.hpp"
#include "integrators/catalogue.hpp"
#include "io/results/result_table.hpp"

namespace pilotis {

namespace {

struct Options {
  std::string file, limits;
  bool json = false;
};

std::vector<double> factors_with_runs(const RunTable& table) {
  std::vector<double> factors;
  for (const RunSet& set : table.sets())
    if (std::find(factors.begin(), factors.end(), set.factor) == factors.end()) factors.push_back(set.factor);
  return factors;
}

// A limit for a factor that was never run would be passed over in silence.
void require_factors(const std::vector<Limit>& limits, const RunTable& table, const Options& options) {
  const auto run = factors_with_runs(table);
  for (std::size_t i = 0; i < limits.size(); ++i)
    for (double factor : limits[i].factors)
      if (std::find(run.begin(), run.end(), factor) == run.end())
        throw input_error(
            options.limits.empty() ? options.file : options.limits,
            fmt::format("limit {} is for factor {:g}, of which {} has no run", i + 1, factor, options.file),
            fmt::format("factors with runs are {:g}", fmt::join(run, ", ")));
}

int judged(const Options& options) {
  const ResultTable table(options.file);
  StudyHeader header = table.header();
  if (!options.limits.empty()) header.limits = read_study(options.limits, scheme_catalogue()).limits;
  require_factors(header.limits, table, options);
  const Verdict verdict = judge(table, header.limits);
  if (options.json)
    write_report_json(header, table, verdict, print_out);
  else
    print_out(profile_text(header, table, verdict, screen_style(stdout)));
  return exit_status(verdict);
}

}  // namespace

void add_verdict(CLI::App& app, int& status) {
  auto options = std::make_shared<Options>();
  CLI::App* command = app.add_subcommand("verdict", "Hold limits against an existing result file");
  command->add_option("file", options->file, "result file (HDF5) that `pilotis run` wrote")->required();
  command->add_option("--limits", options->limits,
                      "take the limits of this study file instead of those in the result file");
  command->add_flag("--json", options->json, "print JSON, in SI units");
  command->footer(
      "Prints the drift profile of every factor, then each limit: HOLDS, EXCEEDED, TOO CLOSE (nearer to the limit "
      "than\n"
      "the step error) or UNDETERMINED (runs that did not converge leave it open).\n"
      "Exit status: 0 every limit holds; 1 a limit is exceeded or a run collapsed; 3 a run was not completed.\n\n"
      "Example:\n  pilotis verdict harbor-clinic.h5 --limits stricter.toml");
  command->callback([options, &status] { status = judged(*options); });
}

}  // namespace pilotis
