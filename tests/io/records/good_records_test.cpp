// Plain text in every dress it is allowed to wear. All numbers are invented.
#include <gtest/gtest.h>

#include "io/records/record.hpp"
#include "tests/io/records/written_file.hpp"

namespace pilotis {
namespace {

struct GoodRecord {
  std::string name, content;
  double step, first;
  std::vector<double> samples;  // m/s2
  RecordHints hints = {};
  std::string note = "";  // part of a note that must be there
};

RecordHints hints(std::optional<std::string> unit, std::optional<double> step = {}, std::optional<double> first = {}) {
  return {std::move(unit), step, first};
}
const RecordHints si = hints("m/s2");
const RecordHints si_50hz = hints("m/s2", 0.02);

const std::vector<GoodRecord> good_records = {
    {"commas", "time (s), acceleration (m/s^2)\n0, 0.1\n0.02, -0.2\n0.04, 0.3\n", 0.02, 0, {0.1, -0.2, 0.3}},
    {"commas_without_blanks", "time (s),acceleration (m/s^2)\n0,0.1\n0.02,-0.2\n", 0.02, 0, {0.1, -0.2}},
    {"semicolons", "0;0.1\n0.02;-0.2\n", 0.02, 0, {0.1, -0.2}, si},
    {"tabs", "0\t0.1\n0.02\t-0.2\n", 0.02, 0, {0.1, -0.2}, si},
    {"blanks", "   0.00   0.1\n   0.02  -0.2  \n", 0.02, 0, {0.1, -0.2}, si},
    {"commas_and_tabs", "0.00,\t0.1\n0.02,\t-0.2\n", 0.02, 0, {0.1, -0.2}, si},
    {"d_exponents", "0.D0 1.D-1\n2.0D-02 -2.0d-01\n4.0D-02 .3D+00\n", 0.02, 0, {0.1, -0.2, 0.3}, si},
    {"e_exponents", "0.0E0 1.E-1\n2.0e-02 -2.0E-01\n", 0.02, 0, {0.1, -0.2}, si},
    {"no_leading_zero_and_plus", "0 +.1\n.02 -.2\n", 0.02, 0, {0.1, -0.2}, si},
    {"decimal_comma_semicolon", "0,00;0,1\n0,02;-0,2\n", 0.02, 0, {0.1, -0.2}, si},
    {"decimal_comma_tab", "0,00\t0,1\n0,02\t-0,2\n", 0.02, 0, {0.1, -0.2}, si},
    {"byte_order_mark",
     "\xEF\xBB\xBF"
     "0 0.1\n0.02 -0.2\n",
     0.02,
     0,
     {0.1, -0.2},
     si},
    {"byte_order_mark_and_heading",
     "\xEF\xBB\xBFtime (s);acceleration (m/s2)\n0;0.1\n0.02;-0.2\n",
     0.02,
     0,
     {0.1, -0.2}},
    {"cr_lf", "# units: m/s2\r\n0 0.1\r\n0.02 -0.2\r\n", 0.02, 0, {0.1, -0.2}},
    {"cr_only", "# units: m/s2\r0 0.1\r0.02 -0.2\r", 0.02, 0, {0.1, -0.2}},
    {"no_last_line_ending", "0 0.1\n0.02 -0.2", 0.02, 0, {0.1, -0.2}, si},
    {"blank_lines_around", "\n\n0 0.1\n0.02 -0.2\n\n \n", 0.02, 0, {0.1, -0.2}, si},
    {"dos_end_of_file", "0 0.1\r\n0.02 -0.2\r\n\x1A\x1A", 0.02, 0, {0.1, -0.2}, si},
    {"all_comment_marks",
     "# a\n% b\n* c\n| d\n/ e\n// f\n0 0.1\n# in between\n0.02 -0.2\n// end\n",
     0.02,
     0,
     {0.1, -0.2},
     si},
    {"quoted_headings", "\"time (s)\",\"acceleration (m/s2)\"\n0,0.1\n0.02,-0.2\n", 0.02, 0, {0.1, -0.2}},
    {"names_and_units", "time;acc\ns;m/s2\n0;0.1\n0.02;-0.2\n", 0.02, 0, {0.1, -0.2}},
    {"commented_heading", "# time (s), acceleration (m/s2)\n0 0.1\n0.02 -0.2\n", 0.02, 0, {0.1, -0.2}},
    {"blank_separated_heading", "time (s)  ground acceleration (m/s2)\n0 0.1\n0.02 -0.2\n", 0.02, 0, {0.1, -0.2}},
    {"milliseconds", "time (ms), acc [m/s2]\n0, 0.1\n20, -0.2\n40, 0.3\n", 0.02, 0, {0.1, -0.2, 0.3}},
    {"units_in_comment", "# units: cm/s2\n0 10\n0.02 -20\n", 0.02, 0, {0.1, -0.2}},
    {"units_of_both_in_comment", "# units: s, cm/s2\n0 10\n0.02 -20\n", 0.02, 0, {0.1, -0.2}},
    {"bracketed_unit", "# [cm/s2]\n0 10\n0.02 -20\n", 0.02, 0, {0.1, -0.2}},
    {"shouted_unit", "# UNITS: CM/SEC/SEC\n0 10\n0.02 -20\n", 0.02, 0, {0.1, -0.2}},
    {"gravity", "# units: g\n0 1\n0.02 -2\n", 0.02, 0, {9.80665, -19.6133}},
    {"same_unit_twice", "# units: m/s^2\n0 0.1\n0.02 -0.2\n", 0.02, 0, {0.1, -0.2}, si},
    {"column_by_hints", "0.1\n-0.2\n0.3\n", 0.02, 0, {0.1, -0.2, 0.3}, si_50hz, "taken at 0 s"},
    {"column_first_sample_by_hint", "0.1\n-0.2\n", 0.02, 0.02, {0.1, -0.2}, hints("m/s2", 0.02, 0.02)},
    {"column_by_file",
     "# step: 0.02 s\n# first sample at: 0.02 s\n# units: m/s2\n0.1\n-0.2\n",
     0.02,
     0.02,
     {0.1, -0.2}},
    {"column_step_in_ms", "dt = 20 ms\nacceleration (m/s2)\n0.1\n-0.2\n", 0.02, 0, {0.1, -0.2}},
    {"step_said_twice", "# dt = 0.02\n# units: m/s2\n0.1\n-0.2\n", 0.02, 0, {0.1, -0.2}, hints({}, 0.02)},
    {"starts_after_one_step", "0.02 0.1\n0.04 -0.2\n0.06 0.3\n", 0.02, 0.02, {0.1, -0.2, 0.3}, si},
    {"starts_elsewhere", "10.00 0.1\n10.02 -0.2\n", 0.02, 0, {0.1, -0.2}, si, "shifted"},
    {"starts_before_zero", "-0.04 0.1\n-0.02 -0.2\n0 0.3\n", 0.02, 0, {0.1, -0.2, 0.3}, si, "shifted"},
    {"time_without_unit", "0 0.1\n0.02 -0.2\n", 0.02, 0, {0.1, -0.2}, si, "taken as seconds"},
    // 1/128 s printed with three decimals; the true step is known to the study.
    {"rounded_times",
     "0.000 1\n0.008 2\n0.016 3\n0.023 4\n0.031 5\n",
     0.0078125,
     0,
     {1, 2, 3, 4, 5},
     hints("m/s2", 0.0078125)},
    {"one_digit_of_jitter", "0.000 1\n0.020 2\n0.041 3\n0.060 4\n0.080 5\n", 0.02, 0, {1, 2, 3, 4, 5}, si, "rounded"},
    // A program that cuts digits off wrote 0.0199999 as 0.019; the study knows better.
    {"cut_off_times", "0.000 1\n0.019 2\n0.040 3\n0.060 4\n", 0.02, 0, {1, 2, 3, 4}, hints("m/s2", 0.02)},
    {"more_columns_with_names",
     "time (s), acceleration (m/s2), velocity (m/s)\n0, 0.1, 5\n0.02, -0.2, 6\n",
     0.02,
     0,
     {0.1, -0.2}},
    {"acceleration_first", "acceleration (m/s2), time (s)\n0.1, 0\n-0.2, 0.02\n", 0.02, 0, {0.1, -0.2}},
    {"direction_is_no_unit", "time, NS\n0, 0.1\n0.02, -0.2\n", 0.02, 0, {0.1, -0.2}, si},
    {"underflow_is_zero", "0 1e-400\n0.02 -0.2\n", 0.02, 0, {0, -0.2}, si},
    {"remarkable_peak", "0 100\n0.02 -0.2\n", 0.02, 0, {100, -0.2}, si, "is the unit \"m/s2\" right"},
};

class GoodRecords : public testing::TestWithParam<GoodRecord> {};

TEST_P(GoodRecords, AreReadAsTheyAre) {
  const GoodRecord& good = GetParam();
  const WrittenFile file("record.txt", good.content);
  const RecordFile read = read_record(file.path(), good.hints);
  EXPECT_EQ(read.format, "plain text");
  EXPECT_DOUBLE_EQ(read.record.step, good.step);
  EXPECT_EQ(read.record.first_sample_at, good.first);
  ASSERT_EQ(read.record.samples.size(), good.samples.size());
  for (std::size_t i = 0; i < good.samples.size(); ++i)
    EXPECT_DOUBLE_EQ(read.record.samples[i], good.samples[i]) << "sample " << i + 1;
  std::string notes;
  for (const std::string& note : read.notes) notes += note + "\n";
  EXPECT_NE(notes.find(good.note), std::string::npos) << notes;
}

INSTANTIATE_TEST_SUITE_P(Plain, GoodRecords, testing::ValuesIn(good_records),
                         [](const auto& info) { return info.param.name; });

TEST(PlainRecords, LongTimesPrintedWithSixDigitsAreEven) {
  std::string text;
  for (int i = 0; i < 30000; ++i) {
    char line[64];
    std::snprintf(line, sizeof line, "%.6g %d\n", i * 0.005, i % 7);  // from 100 s on with three decimals
    text += line;
  }
  const WrittenFile file("long.txt", text);
  const RecordFile read = read_record(file.path(), si);
  EXPECT_EQ(read.record.step, 0.005);
  EXPECT_EQ(read.record.samples.size(), 30000u);
}

// 1/256 s printed with four decimals, more than ten times finer than it rises, so the step can be worked out. Slope of
// a straight line through n points, each wrong by at most h = 0.00005 s: wrong by at most 3 h / n for large n.
TEST(PlainRecords, FinelyPrintedOddStepIsWorkedOutAndNoted) {
  std::string text;
  for (int i = 0; i < 1000; ++i) {
    char line[64];
    std::snprintf(line, sizeof line, "%.4f %d\n", i / 256.0, i % 7);
    text += line;
  }
  const WrittenFile file("odd.txt", text);
  const RecordFile read = read_record(file.path(), si);
  EXPECT_NEAR(read.record.step, 1 / 256.0, 3.1 * 0.00005 / 1000);
  ASSERT_FALSE(read.notes.empty());
  EXPECT_NE(read.notes.back().find("rounded"), std::string::npos);
}

TEST(RecordFormats, AreEachNamedOnceAndEndWithPlainText) {
  const auto formats = record_formats();
  ASSERT_FALSE(formats.empty());
  for (std::size_t i = 0; i < formats.size(); ++i) {
    EXPECT_FALSE(formats[i].summary.empty());
    for (std::size_t j = 0; j < i; ++j) EXPECT_NE(formats[i].name, formats[j].name);
  }
  EXPECT_TRUE(formats.back().recognises("anything at all"));
}

}  // namespace
}  // namespace pilotis
