#include "apps/profile.hpp"

#include <fmt/format.h>
#include <gtest/gtest.h>

#include <cmath>
#include <nlohmann/json.hpp>
#include <regex>
#include <sstream>

#include "apps/report_json.hpp"
#include "apps/text_layout.hpp"
#include "core/verdict/memory_table.hpp"
#include "io/results/store.hpp"
#include "tests/support/invented_results.hpp"
#include "tests/support/large_study.hpp"

namespace pilotis {
namespace {

const ScreenStyle plain{100, false, true};

std::string shown(const StoredStudy& stored, const ScreenStyle& style = plain) {
  const MemoryTable table(stored.buildings, stored.runs);
  return profile_text(stored, table, judge(table, stored.limits), style);
}

std::vector<std::string> lines_of(const std::string& text) {
  std::istringstream in(text);
  std::vector<std::string> lines;
  for (std::string line; std::getline(in, line);) lines.push_back(line);
  return lines;
}

// The lines between the title of a factor and the next one.
std::vector<std::string> block_of(const std::string& text, const std::string& factor) {
  std::vector<std::string> block;
  bool inside = false;
  for (const std::string& line : lines_of(text)) {
    if (line.starts_with("Ground motion") || line == "Verdict")
      inside = line.starts_with("Ground motion × " + factor + " ");
    if (inside) block.push_back(line);
  }
  return block;
}

std::string story_line(const std::string& text, const std::string& factor, int story) {
  for (const std::string& line : block_of(text, factor))
    if (line.starts_with(fmt::format("{:>3} ", story))) return line;
  return "";
}

bool has(const std::string& text, const std::string& part) { return text.find(part) != std::string::npos; }

std::size_t count(const std::string& text, const std::string& part) {
  std::size_t found = 0;
  for (auto at = text.find(part); at != std::string::npos; at = text.find(part, at + 1)) ++found;
  return found;
}

std::string shown_large(const invented::Size& size, const ScreenStyle& style = plain, bool limits = true) {
  StudyHeader header = large_header(size);
  if (!limits) header.limits.clear();
  const std::vector<RunResult> runs = large_runs(size, 0, size.runs());
  const MemoryTable table(header.buildings, runs);
  return profile_text(header, table, judge(table, header.limits), style);
}

// By the formula of the invented results, story 3 at factor 1: 0.6, 0.7, 0.8, 0.9, 1.0 % drift ratio under the five
// motions: mean 0.80, largest 1.00 with step error 1% of it, motion 5; margin to the limit of 1 %: 20 %.
TEST(Profile, StoryLineHoldsTheFactsOfTheFormula) {
  const std::string line = story_line(shown(invented::calm_study()), "1", 3);
  std::istringstream in(line);
  std::string number, label, statistic, largest, error;
  in >> number >> label >> statistic >> largest >> error;
  EXPECT_EQ(label, "clinic");
  EXPECT_EQ(statistic, "0.80");
  EXPECT_EQ(largest, "1.00");
  EXPECT_EQ(error, "0.010");
  EXPECT_TRUE(has(line, " 20  Elmsgate")) << line;
  EXPECT_TRUE(has(line, "0.120")) << "residual 12% of 1 %: " << line;
  EXPECT_TRUE(has(line, "2.22")) << "ductility 0.01 / 0.0045: " << line;
}

TEST(Profile, FromTheRoofDown) {
  const std::string text = shown(invented::calm_study());
  int expected = invented::stories;
  for (const std::string& line : block_of(text, "0.5"))
    if (expected > 0 && line.starts_with(fmt::format("{:>3} ", expected))) --expected;
  EXPECT_EQ(expected, 0);
}

TEST(Profile, BuildingFactsInTheStudysUnits) {
  const std::string text = shown(invented::calm_study());
  EXPECT_TRUE(has(text, "8 stories"));
  EXPECT_TRUE(has(text, "height 29.0 m"));    // 4.5 + 7 * 3.5
  EXPECT_TRUE(has(text, "weight 32950 kN"));  // 8 * 420 t * 9.80665 = 32950.3 kN
  EXPECT_TRUE(has(text, "T1 1.08 s"));
  StoredStudy other = invented::calm_study();
  other.units = {"kip", "ft", ""};
  const std::string in_kips = shown(other);
  EXPECT_TRUE(has(in_kips, "weight 7408 kip"));  // 1 kip = 4448.2216152605 N (NIST SP 811, appendix B)
  EXPECT_TRUE(has(in_kips, "height 95.1 ft"));   // 29 / 0.3048
  EXPECT_TRUE(has(in_kips, "base shear, kip"));
}

TEST(Profile, NoLineIsWiderThanTheScreen) {
  for (int width : {80, 90, 100, 132})
    for (bool unicode : {true, false}) {
      StoredStudy stored = invented::study_with_open_run();
      stored.limits.push_back({&residual_drift_ratio(),
                               Statistic::percentile,
                               84,
                               0.005,
                               "a source that is told at great length because the owner of the clinic likes it so",
                               {}});
      stored.limits.push_back({find_quantity("floor_acceleration"), Statistic::max, 0, 5, "", {}});
      for (const std::string& line : lines_of(shown(stored, {width, false, unicode})))
        EXPECT_LE(columns_of(line), static_cast<std::size_t>(width)) << line;
    }
}

TEST(Profile, AsciiWhereTheScreenHasNothingElse) {
  StoredStudy stored = invented::calm_study();
  for (char c : shown(stored, {100, false, false})) ASSERT_LT(static_cast<unsigned char>(c), 0x80);
}

// Escapes change nothing but color: without them the two texts are one.
TEST(Profile, ColorOnlyWhenAskedAndNothingElseChanges) {
  const StoredStudy stored = invented::study_with_open_run();
  const std::string colored = shown(stored, {100, true, true});
  EXPECT_FALSE(has(shown(stored), "\x1b"));
  EXPECT_TRUE(has(colored, "\x1b[1;31m"));
  EXPECT_EQ(std::regex_replace(colored, std::regex("\x1b\\[[0-9;]*m"), ""), shown(stored));
}

TEST(Profile, VerdictLines) {
  StoredStudy stored = invented::calm_study();
  // At factor 1 the mean of story 3 is 0.80 % with step error 0.008 %.
  stored.limits = {invented::drift_limit(Statistic::mean, 0.00795), invented::drift_limit(Statistic::max, 0.009)};
  const std::string text = shown(stored);
  EXPECT_TRUE(has(text, "mean drift ratio ≤ 0.80 %"));
  EXPECT_TRUE(has(text, "(project brief, section 4)"));
  EXPECT_TRUE(
      std::regex_search(text, std::regex("TOO CLOSE +× 1 +0\\.80 ± 0\\.008 % +margin -1 % +story 3 +Elmsgate north")));
  EXPECT_TRUE(std::regex_search(text, std::regex("HOLDS +× 0\\.5 +0\\.40 ± 0\\.004 % +margin 50 %")));
  EXPECT_TRUE(std::regex_search(text, std::regex("EXCEEDED +× 1 +1\\.00 ± 0\\.010 % +margin -11 %")));
  EXPECT_TRUE(has(text, "Of 4 checks: 2 hold, 1 exceeded, 1 too close to call."));
  EXPECT_TRUE(has(text, "Results rest on the model; local codes and licensed practice decide."));
}

TEST(Profile, CollapsedAndOpenRunsAreNamed) {
  const std::string text = shown(invented::study_with_open_run());
  EXPECT_TRUE(has(text, "15 runs: 13 done, 1 collapsed, 1 not converged"));
  EXPECT_TRUE(has(text, "run 14  Elmsgate north × 1.5  collapsed at 8.25 s: story 3 passed drift ratio 0.1"));
  EXPECT_TRUE(has(text, "run 12  Cinder pass × 1.5  not converged at 11.5 s"));
  EXPECT_TRUE(has(text, "3 of 5 runs lasted to the end"));
  EXPECT_TRUE(has(text, "beyond (collapse)"));
  EXPECT_TRUE(has(text, "1 run collapsed. 1 run did not converge."));
}

TEST(Profile, NoLimitIsSaid) {
  StoredStudy stored = invented::calm_study();
  stored.limits.clear();
  const std::string text = shown(stored);
  EXPECT_TRUE(has(text, "No limit was set, so nothing was judged."));
  EXPECT_FALSE(has(text, "margin"));
}

TEST(Profile, UnknownStepErrorIsAQuestionMark) {
  StoredStudy stored = invented::calm_study();
  for (RunResult& run : stored.runs)
    for (Peak& peak : run.peaks) peak.step_error = NAN;
  const std::string text = shown(stored);
  EXPECT_TRUE(has(text, "0.80 ± ? %"));
  EXPECT_FALSE(has(text, "nan"));
}

// Two and more buildings are told apart; the sets of one stand under its name.
TEST(Profile, FewSetsOfSeveralBuildingsWhole) {
  const invented::Size size{2, 2, 20, 0};
  const std::string text = shown_large(size);
  EXPECT_TRUE(has(text, "\n2 buildings\n"));
  EXPECT_TRUE(has(text, "\nblock 0\n4 stories"));
  EXPECT_TRUE(has(text, "\nblock 1\n7 stories"));
  EXPECT_EQ(count(text, "Ground motion × "), 4u);
  EXPECT_TRUE(std::regex_search(text, std::regex("EXCEEDED +block 1 +× 0\\.25"))) << text;
  EXPECT_TRUE(has(text, "run 49  block 1  record 009 × 0.25  collapsed at 30 s")) << text;
}

// Runs that collapse (every 50th) are in the sets of runs 40..59, 80..99, ...: the mean of these is beyond the limit.
TEST(Profile, ManySetsInALineEach) {
  const invented::Size size{3, 5, 20, 0};
  const std::string text = shown_large(size);
  EXPECT_TRUE(has(text, "15 sets of building and factor: 6 exceed a limit, 2 undetermined, 7 hold")) << text;
  EXPECT_EQ(count(text, "\n  block "), 15u) << text;
  EXPECT_EQ(count(text, "Ground motion × "), 1u) << "the governing one only";
  EXPECT_TRUE(std::regex_search(text, std::regex("\n  block 0 +0\\.75 +20 +1 +0 .* none   EXCEEDED"))) << text;
  EXPECT_TRUE(has(text, "of 15 checks: 7 hold, 6 exceeded, 2 undetermined\n    least margin:\n")) << text;
}

TEST(Profile, VeryManySetsTheWorstOnly) {
  const invented::Size size{30, 4, 5, 3};
  const std::string text = shown_large(size);
  EXPECT_TRUE(has(text, "120 sets of building and factor:"));
  EXPECT_EQ(count(text, "\n  block "), most_sets_listed) << text;
  EXPECT_TRUE(has(text, "These are the 40 worst; --json tells of all 120."));
  for (int width : {80, 100})
    for (const std::string& line : lines_of(shown_large(size, {width, false, true})))
      EXPECT_LE(columns_of(line), static_cast<std::size_t>(width)) << line;
}

TEST(Profile, ManyFactorsOfOneBuildingWithoutLimits) {
  const std::string text = shown_large({1, 14, 5, 3}, plain, false);
  EXPECT_TRUE(has(text, "14 factors: 14 not judged")) << text;
  EXPECT_FALSE(has(text, "block"));
}

std::string told(const StoredStudy& stored) {
  const MemoryTable table(stored.buildings, stored.runs);
  std::string text;
  write_report_json(stored, table, judge(table, stored.limits), [&](std::string_view part) { text += part; });
  return text;
}

// Written piece by piece, it stands as the library's own writer would lay it out.
TEST(ReportJson, LaidOutAsOnePiece) {
  const std::string text = told(invented::study_with_open_run());
  EXPECT_EQ(text, nlohmann::ordered_json::parse(text).dump(2) + "\n");
}

TEST(ReportJson, SeveralBuildingsAreNamed) {
  const invented::Size size{2, 3, 20, 0};
  const StudyHeader header = large_header(size);
  const std::vector<RunResult> runs = large_runs(size, 0, size.runs());
  const MemoryTable table(header.buildings, runs);
  std::string text;
  write_report_json(header, table, judge(table, header.limits), [&](std::string_view part) { text += part; });
  const auto json = nlohmann::json::parse(text);
  EXPECT_EQ(json.at("buildings").at(1).at("name"), "block 1");
  EXPECT_EQ(json.at("factors").size(), 6u);
  EXPECT_EQ(json.at("factors").at(4).at("building"), "block 1");
  EXPECT_EQ(json.at("factors").at(4).at("factor"), 0.5);
  EXPECT_EQ(json.at("factors").at(4).at("stories").size(), 7u);
  EXPECT_EQ(json.at("verdict").at(3).at("building"), "block 1");
  EXPECT_EQ(json.at("ended_early").size(), 3u) << "runs 49, 76 and 99";
  EXPECT_EQ(json.at("ended_early").at(1).at("run"), 76);
}

TEST(ReportJson, SameNumbersAndNoNonFiniteOnes) {
  const StoredStudy stored = invented::study_with_open_run();
  const auto json = nlohmann::json::parse(told(stored));
  const auto& story = json.at("factors").at(1).at("stories").at(2);
  EXPECT_EQ(story.at("story"), 3);
  EXPECT_NEAR(story.at("drift_ratio").at("largest").get<double>(), 0.01, 1e-15);
  EXPECT_NEAR(story.at("drift_ratio_statistic").get<double>(), 0.008, 1e-15);
  EXPECT_NEAR(story.at("margin").get<double>(), 0.2, 1e-12);
  EXPECT_EQ(json.at("units").at("story_shear"), "N");
  const auto& decided_by_collapse = json.at("verdict").at(2);
  EXPECT_TRUE(decided_by_collapse.at("value").is_null());
  EXPECT_EQ(decided_by_collapse.at("finding"), "exceeded");
  EXPECT_EQ(decided_by_collapse.at("collapsed"), 1);
  EXPECT_EQ(json.at("ended_early").size(), 2u);
  EXPECT_EQ(json.at("exit_status"), 3);
}

}  // namespace
}  // namespace pilotis
