// pilotis fit scale: factors that bring a suite to a target spectrum.
#include <fmt/format.h>

#include <memory>

#include "apps/fit_commands.hpp"
#include "apps/fit_suite.hpp"

namespace pilotis {

namespace {

struct ScaleOptions {
  FitOptions fit{.command = "fit scale"};
  SuiteOptions suite;
};

void scale(const ScaleOptions& options, int& status) {
  const FitTask task = task_of(options.fit);
  ChosenSuite suite{task.motions, spectra_of(task.motions, wanted_oscillators(task), task.hints), "", {}, {}};
  suite.before_name = fmt::format("mean of {} as given", task.motions.size());
  suite.before = mean_of(suite.spectra);
  finish_suite(options.fit, options.suite, task, suite, status);
}

}  // namespace

void add_fit_scale(CLI::App& fit, int& status) {
  const auto options = std::make_shared<ScaleOptions>();
  CLI::App* command = fit.add_subcommand("scale", "factors that bring a suite to a target spectrum");
  add_fit_options(*command, options->fit);
  add_suite_options(*command, options->suite);
  command->footer(
      "Least squares of the logarithms over the periods; the mean of a suite is the arithmetic one, as codes take it.\n"
      "Exit status 1: a clause of --code does not hold.\n\n"
      "Examples:\n"
      "  pilotis fit scale data-demo/motions/*.csv --target en_1998 --ag \"0.3 g\" --type 1 --ground B --period 0.9 "
      "--at-least 0.9 --code en_1998\n"
      "  pilotis fit scale data-demo/motions/*.csv --target en_1998 --ag \"0.3 g\" --type 1 --ground B --from 0.2 --to "
      "2 "
      "--study\n"
      "  pilotis fit scale E1.txt+N1.txt E2.txt+N2.txt --target asce_7_16_mcer --s-ds \"1 g\" --s-d1 \"0.6 g\" --t-l 8 "
      "--period 0.9 --code asce_7_16");
  command->callback([options, &status] { scale(*options, status); });
}

}  // namespace pilotis
