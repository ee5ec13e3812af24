// What `pilotis fit scale`, `select` and `match` have in common: options, period range, spectra, where results go.
#pragma once

#include <CLI/CLI.hpp>
#include <string>
#include <vector>

#include "apps/fit_clauses.hpp"
#include "apps/fit_motions.hpp"
#include "apps/target_option.hpp"

namespace pilotis {

struct FitOptions {
  std::string command = {};             // "fit scale", for messages
  bool matching = false;                // a record is changed, not only scaled
  std::vector<std::string> files = {};  // as typed
  std::string units = {}, step = {};    // of records that do not say; empty: they do
  TypedTarget target = {};
  std::vector<double> dampings{0.05};  // fraction of critical, of the target; one but for matching
  std::string from = {}, to = {};      // period range as typed; empty: 0.2 and 2 times --period
  int periods = 0;                     // how many in the range; 0: as many as is usual
  TypedCode code = {};
  std::string csv = {}, svg = {};  // files to write; empty: none
  bool json = false;
};

void add_fit_options(CLI::App& command, FitOptions& options);

// Everything understood, before anything is computed.
struct FitTask {
  std::vector<FitMotion> motions;
  RecordHints hints;
  double from = 0, to = 0;               // s
  std::vector<TargetSpectrum> targets;   // one for each damping
  std::vector<double> periods;           // s, in the range, where the fit is made
  std::vector<double> target_ordinates;  // m/s2, of the first target, at these periods
  std::vector<double> shown;             // s, wider: for the picture; empty without --svg
  CodeCheck code;
};
// Throws Error (input).
FitTask task_of(const FitOptions& options);

// The oscillators whose spectra are wanted of every motion: at `periods` and `shown` with the first target's damping,
// then at the code's periods with 5 %.
std::vector<Oscillator> wanted_oscillators(const FitTask& task);
// The three parts of a spectrum of these oscillators, m/s2.
struct SpectrumParts {
  std::vector<double> fitted, shown, code;
};
SpectrumParts parts_of(const std::vector<double>& accelerations, const FitTask& task);

}  // namespace pilotis
