#include <fmt/format.h>
#include <gtest/gtest.h>

#include <sstream>

#include "apps/export_tables.hpp"
#include "tests/support/invented_results.hpp"

namespace pilotis {
namespace {

std::vector<std::string> lines_of(const std::string& text) {
  std::istringstream in(text);
  std::vector<std::string> lines;
  for (std::string line; std::getline(in, line);) lines.push_back(line);
  return lines;
}

TableUnits si(const StoredStudy& stored) { return TableUnits(false, stored.units); }

TEST(Export, EveryRowHasTheCellsOfTheHeader) {
  const StoredStudy stored = invented::study_with_open_run();
  const RunResult kept = invented::calm_study().results.runs[0];
  for (const std::string& table :
       {peaks_csv(stored, si(stored), -1), residuals_csv(stored, si(stored), -1), runs_csv(stored, si(stored), -1),
        motions_csv(stored, si(stored)), building_csv(stored, si(stored)),
        history_header() + history_rows(kept, 0, invented::stories, si(stored))}) {
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
  const auto find = [](const std::string& table) {
    for (const std::string& line : lines_of(table))
      if (line.starts_with("0,Aldermoor 090,0.5,done,drift,story,3,")) return line.substr(39);
    return std::string();
  };
  EXPECT_NEAR(std::stod(find(peaks_csv(stored, si(stored), -1))), 0.0105, 1e-15);
  const std::string in_cm = find(peaks_csv(stored, TableUnits(true, stored.units), -1));
  EXPECT_NEAR(std::stod(in_cm), 1.05, 1e-13);
  EXPECT_NE(in_cm.find(",cm,"), std::string::npos) << in_cm;
}

TEST(Export, OneRunOnly) {
  const StoredStudy stored = invented::calm_study();
  const auto lines = lines_of(runs_csv(stored, si(stored), 3));
  ASSERT_EQ(lines.size(), 2u);
  EXPECT_TRUE(lines[1].starts_with("3,Dunmarsh,0.5,done,"));
}

// RFC 4180, section 2, rules 6 and 7.
TEST(Export, CellsAreQuotedAsRfc4180Says) {
  EXPECT_EQ(csv_cell("plain"), "plain");
  EXPECT_EQ(csv_cell("a,b"), "\"a,b\"");
  EXPECT_EQ(csv_cell("say \"no\""), "\"say \"\"no\"\"\"");
}

}  // namespace
}  // namespace pilotis
