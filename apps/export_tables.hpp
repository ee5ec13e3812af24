// Result files as comma-separated tables (RFC 4180): a header row, then one value per row (long, tidy form).
#pragma once

#include <string>
#include <vector>

#include "core/response/results.hpp"
#include "io/study/study.hpp"

namespace pilotis {

// Which units the numbers are in: SI, or the study's own. The tables say so in a column or in the column's name.
struct TableUnits {
  explicit TableUnits(bool study, const StudyUnits& units) : study_(study), units_(units) {}
  double factor(Dimension dimension) const { return study_ ? units_.factor(dimension) : 1; }
  std::string name(Dimension dimension) const {
    return study_ ? units_.name(dimension) : std::string(si_unit(dimension));
  }

 private:
  bool study_;
  StudyUnits units_;
};

// A cell as RFC 4180 has it: quoted when it holds a comma, a quote or a line break.
std::string csv_cell(const std::string& text);

// Header rows, each with its line end.
std::string peaks_header();
std::string residuals_header(const TableUnits& units);
std::string runs_header(const TableUnits& units);
std::string history_header();

// A run of the file with its number, from 0, and its building.
struct NumberedRun {
  const RunResult& run;
  std::size_t number;
  const BuildingSummary& building;
};

// The rows of one run, so that runs may follow each other without being in memory together.
std::string peaks_rows(const NumberedRun& of, const TableUnits& units);
std::string residuals_rows(const NumberedRun& of, const TableUnits& units);
std::string runs_rows(const NumberedRun& of, const TableUnits& units);
std::string history_rows(const NumberedRun& of, const TableUnits& units);

// Whole tables.
std::string motions_csv(const std::vector<MotionSummary>& motions, const TableUnits& units);
std::string building_header();
std::string building_rows(const BuildingSummary& building, const TableUnits& units);

}  // namespace pilotis
