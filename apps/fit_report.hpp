// What `pilotis fit` tells: spectra before and after against the target, the clauses of a code, as text, CSV and JSON.
#pragma once

#include <nlohmann/json.hpp>
#include <string>
#include <vector>

#include "apps/fit_options.hpp"
#include "apps/fit_picture.hpp"

namespace pilotis {

struct FitReport {
  std::string before_name, after_name;                // "mean of 7 as given"
  std::vector<double> before, after;                  // m/s2, [period of the fit]
  std::vector<double> shown_before, shown_after;      // m/s2, [period of the picture]
  std::vector<std::string> names;                     // of the motions after, and their spectra
  std::vector<std::vector<double>> each, shown_each;  // m/s2, [motion][period]
  std::vector<ClauseFinding> findings;
};

// Mean over the rows (all of one length, at least one row).
std::vector<double> mean_of(const std::vector<std::vector<double>>& rows);

// About fifteen periods of the range: target, before, after in g, and after over target.
std::string spectra_text(const FitReport& report, const FitTask& task);
// Target, range and damping in words.
std::string task_text(const FitTask& task);
// All periods of the fit, and every motion after, in m/s2.
std::string spectra_csv(const FitReport& report, const FitTask& task);
// Members target, range, spectra and clauses.
nlohmann::ordered_json report_json(const FitReport& report, const FitTask& task);

// Writes what --csv and --svg ask for. `title`: of the picture.
void write_files(const FitOptions& options, const FitReport& report, const FitTask& task, const std::string& title);

}  // namespace pilotis
