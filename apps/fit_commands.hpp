// The subcommands of `pilotis fit`, one file each.
#pragma once

#include <CLI/CLI.hpp>

namespace pilotis {

void add_fit_scale(CLI::App& fit, int& status);
void add_fit_select(CLI::App& fit, int& status);
void add_fit_match(CLI::App& fit, int& status);

}  // namespace pilotis
