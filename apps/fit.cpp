// pilotis fit: scales, selects or matches motions to a target spectrum.
#include "apps/commands.hpp"
#include "apps/fit_commands.hpp"

namespace pilotis {

void add_fit(CLI::App& app, int& status) {
  CLI::App* fit = app.add_subcommand("fit", "scale, select or match motions to a target spectrum");
  add_fit_scale(*fit, status);
  add_fit_select(*fit, status);
  add_fit_match(*fit, status);
  fit->require_subcommand(1);
  fit->footer(
      "Examples:\n"
      "  pilotis fit scale data-demo/motions/*.csv --target en_1998 --ag \"0.3 g\" --type 1 --ground B --period 0.9\n"
      "  pilotis fit select data-demo/motions -n 3 --target en_1998 --ag \"0.3 g\" --type 1 --ground B --period 0.9\n"
      "  pilotis fit match data-demo/motions/quay-01.csv --target en_1998 --ag \"0.3 g\" --type 1 --ground B --from "
      "0.1 "
      "--to 2 -o matched.csv");
}

}  // namespace pilotis
