// pilotis fit select: the motions of many whose mean and spread fit a target spectrum.
#include <fmt/format.h>

#include <memory>

#include "apps/fit_commands.hpp"
#include "apps/fit_suite.hpp"
#include "core/motion/fit/select_motions.hpp"

namespace pilotis {

namespace {

struct SelectOptions {
  FitOptions fit{.command = "fit select"};
  SuiteOptions suite;
  SelectionWish wish{.count = 7};
  double spread = 0;  // sigma of ln, the same at every period
};

SelectionWish wish_of(const SelectOptions& options, std::size_t periods) {
  SelectionWish wish = options.wish;
  wish.scale_each = !options.suite.single;
  wish.deviation.assign(periods, options.spread);
  return wish;
}

void select(const SelectOptions& options, int& status) {
  const FitTask task = task_of(options.fit);
  const std::vector<MotionSpectrum> offered = spectra_of(task.motions, wanted_oscillators(task), task.hints);
  const SelectionWish wish = wish_of(options, task.periods.size());
  const Selection selection = select_motions(problem_of(offered, task), wish, "fit select");
  ChosenSuite suite;
  for (const std::size_t place : selection.motions) {
    suite.motions.push_back(task.motions[place]);
    suite.spectra.push_back(offered[place]);
  }
  suite.before_name = fmt::format("mean of {} offered", offered.size());
  suite.before = mean_of(offered);
  suite.remarks = {
      fmt::format("{} of {} motions; wanted: the target as their mean, a deviation of ln of {:g} at every "
                  "period; cost {:.4g}",
                  wish.count, offered.size(), options.spread, selection.cost)};
  finish_suite(options.fit, options.suite, task, suite, status);
}

}  // namespace

void add_fit_select(CLI::App& fit, int& status) {
  const auto options = std::make_shared<SelectOptions>();
  CLI::App* command = fit.add_subcommand("select", "the best motions of many, by mean and spread of their spectra");
  add_fit_options(*command, options->fit);
  add_suite_options(*command, options->suite);
  SelectionWish& wish = options->wish;
  command->add_option("-n,--count", wish.count, "how many motions to choose [7]")->check(CLI::Range(1, 100000));
  command->add_option("--spread", options->spread, "standard deviation of ln that is wanted at every period [0]")
      ->check(CLI::Range(0.0, 10.0));
  command->add_option("--spread-weight", wish.spread_weight, "what the spread counts against the mean [1]")
      ->check(CLI::Range(0.0, 1e6));
  command->add_option("--least-factor", wish.least_factor, "leaves out motions with a smaller factor, before any lift")
      ->check(CLI::Range(0.0, 1e6));
  command->add_option("--most-factor", wish.most_factor, "leaves out motions with a larger factor, before any lift")
      ->check(CLI::Range(0.0, 1e6));
  command->footer(
      "Motions are added one by one and then exchanged as long as it helps: no single exchange improves the choice.\n"
      "With --single motions are compared as they are. Whether they suit the site, spectra do not tell.\n\n"
      "Example:\n"
      "  pilotis fit select data-demo/motions -n 3 --target en_1998 --ag \"0.3 g\" --type 1 --ground B --period 0.9 "
      "--most-factor 4 --code en_1998");
  command->callback([options, &status] { select(*options, status); });
}

}  // namespace pilotis
