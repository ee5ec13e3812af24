#include <fmt/format.h>
#include <gtest/gtest.h>

#include <sstream>

#include "apps/export_tables.hpp"
#include "io/results/store.hpp"
#include "tests/support/invented_results.hpp"

namespace pilotis {
namespace {

std::vector<std::string> lines_of(const std::string& text) {
  std::istringstream in(text);
  std::vector<std::string> lines;
  for (std::string line; std::getline(in, line);) lines.push_back(line);
  return lines;
}

// Header and rows of all runs, or of one.
template <class Rows>
std::string table_of(const StoredStudy& stored, const std::string& header, Rows rows, const TableUnits& units) {
  std::string text = header;
  for (std::size_t i = 0; i < stored.runs.size(); ++i)
    text += rows(NumberedRun{stored.runs[i], i, stored.buildings[0]}, units);
  return text;
}

TableUnits si(const StoredStudy& stored) { return TableUnits(false, stored.units); }

TEST(Export, EveryRowHasTheCellsOfTheHeader) {
  const StoredStudy stored = invented::study_with_open_run();
  for (const std::string& table :
       {table_of(stored, peaks_header(), peaks_rows, si(stored)),
        table_of(stored, residuals_header(si(stored)), residuals_rows, si(stored)),
        table_of(stored, runs_header(si(stored)), runs_rows, si(stored)), motions_csv(stored.motions, si(stored)),
        building_header() + building_rows(stored.buildings[0], si(stored)),
        table_of(invented::calm_study(), history_header(), history_rows, si(stored))}) {
    const auto lines = lines_of(table);
    ASSERT_GT(lines.size(), 1u);
    const auto cells = [](const std::string& line) {  // commas outside quotes
      bool quoted = false;
      int count = 1;
      for (char c : line) {
        if (c == '"') quoted = !quoted;
        count += c == ',' && !quoted;
      }
      return count;
    };
    for (const std::string& line : lines) EXPECT_EQ(cells(line), cells(lines[0])) << line;
  }
}

// Story 3 under motion 0 at factor 0.5 drifts by 0.5 * 0.006 of 3.5 m: 0.0105 m.
TEST(Export, PeaksInSiAndInTheStudysUnits) {
  StoredStudy stored = invented::calm_study();
  stored.units.length = "cm";
  const std::string beginning = "0,Harbor clinic,Aldermoor 090,0.5,done,drift,story,3,";
  const auto find = [&](const std::string& table) {
    for (const std::string& line : lines_of(table))
      if (line.starts_with(beginning)) return line.substr(beginning.size());
    return std::string();
  };
  EXPECT_NEAR(std::stod(find(table_of(stored, peaks_header(), peaks_rows, si(stored)))), 0.0105, 1e-15);
  const std::string in_cm = find(table_of(stored, peaks_header(), peaks_rows, TableUnits(true, stored.units)));
  EXPECT_NEAR(std::stod(in_cm), 1.05, 1e-13);
  EXPECT_NE(in_cm.find(",cm,"), std::string::npos) << in_cm;
}

// RFC 4180, section 2, rules 6 and 7.
TEST(Export, CellsAreQuotedAsRfc4180Says) {
  EXPECT_EQ(csv_cell("plain"), "plain");
  EXPECT_EQ(csv_cell("a,b"), "\"a,b\"");
  EXPECT_EQ(csv_cell("say \"no\""), "\"say \"\"no\"\"\"");
}

}  // namespace
}  // namespace pilotis
