// Result files as comma-separated tables (RFC 4180): a header row, then one value per row (long, tidy form).
#pragma once

#include <string>

#include "io/results/store.hpp"

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

// `run`: -1 for all runs.
std::string peaks_csv(const StoredStudy& stored, const TableUnits& units, int run);
std::string residuals_csv(const StoredStudy& stored, const TableUnits& units, int run);
std::string runs_csv(const StoredStudy& stored, const TableUnits& units, int run);
std::string motions_csv(const StoredStudy& stored, const TableUnits& units);
std::string building_csv(const StoredStudy& stored, const TableUnits& units);
// Without the header row, so that runs may follow each other.
std::string history_rows(const RunResult& run, int number, int stories, const TableUnits& units);
std::string history_header();

}  // namespace pilotis
