// What `pilotis fit scale` and `select` share once the motions are known: factors, and telling them.
#pragma once

#include <string>
#include <vector>

#include "apps/fit_options.hpp"
#include "core/motion/fit/scale_suite.hpp"

namespace pilotis {

struct SuiteOptions {
  bool single = false;  // one factor for all
  double at_least = 0;  // of the target, the mean nowhere below
  std::string output;   // file for the table of factors; empty: none
  bool study = false;   // the [suite] section on standard output instead of tables
};

void add_suite_options(CLI::App& command, SuiteOptions& options);

// The motions to use and what they are compared with.
struct ChosenSuite {
  std::vector<FitMotion> motions;
  std::vector<MotionSpectrum> spectra;  // of wanted_oscillators
  std::string before_name;              // "mean of 200 offered"
  std::vector<double> before;           // m/s2, [wanted oscillator]
  std::vector<std::string> remarks;     // what came before, one line each
};

FitProblem problem_of(const std::vector<MotionSpectrum>& spectra, const FitTask& task);
std::vector<double> mean_of(const std::vector<MotionSpectrum>& spectra);

// Scales, checks, prints and writes. Sets `status` to 1 where a clause does not hold.
void finish_suite(const FitOptions& options, const SuiteOptions& suite_options, const FitTask& task,
                  const ChosenSuite& suite, int& status);

}  // namespace pilotis
