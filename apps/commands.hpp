// The commands of the program: one file each, listed here and in main.cpp once.
#pragma once

#include <CLI/CLI.hpp>

#include "core/error.hpp"

namespace pilotis {

// Exit statuses: 0 done and every limit holds; 1 done, a limit is exceeded; 2 the input is wrong; 3 some run could not
// be completed; 4 something outside failed (disk, permission).
enum ExitStatus : int { all_hold = 0, limit_exceeded = 1, wrong_input = 2, not_completed = 3, outside_failed = 4 };

ExitStatus exit_status_of(const Error& error);

// Each adds its subcommand with help and an example; when it is called it does the work and sets `status`.
// It may throw Error: main shows it and turns its kind into the status.
void add_check(CLI::App& app, int& status);
void add_run(CLI::App& app, int& status);
void add_modes(CLI::App& app, int& status);
void add_motion(CLI::App& app, int& status);
void add_synth(CLI::App& app, int& status);
void add_fit(CLI::App& app, int& status);
void add_verdict(CLI::App& app, int& status);
void add_export(CLI::App& app, int& status);

}  // namespace pilotis
