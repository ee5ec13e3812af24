// What must be refused, and what the message must hold: the file, the line, the offending text. All records are
// invented.
#include <gtest/gtest.h>
#include <unistd.h>

#include "core/error.hpp"
#include "io/records/record.hpp"
#include "tests/io/records/written_file.hpp"

namespace pilotis {
namespace {

struct BadRecord {
  std::string name, content;
  int line;  // 0: the error is of the whole file
  std::vector<std::string> said;
  RecordHints hints = {"m/s2", {}, {}};
};

const RecordHints nothing{};
const RecordHints si_50hz{"m/s2", 0.02, {}};

std::string peer(const std::string& third, const std::string& fourth, const std::string& values) {
  return "PEER NGA STRONG MOTION DATABASE RECORD\nInvented event, station\n" + third + "\n" + fourth + "\n" + values;
}
const std::string of_g = "ACCELERATION TIME SERIES IN UNITS OF G";

const std::vector<BadRecord> bad_records = {
    {"empty", "", 0, {"empty (0 bytes)"}},
    {"only_comments", "# one\n# two\n", 2, {"2 comment line(s)"}},
    {"only_blank_lines", "\n\n\n", 3, {"without a number"}},
    {"only_words", "no numbers\nat all\n", 1, {"\"no numbers\""}},
    {"one_sample", "# units: g\n0.1\n", 2, {"one row"}, {{}, 0.02, {}}},
    {"one_timed_sample", "0 0.1\n", 1, {"one row"}},
    {"not_a_number", "0 0.1\n0.02 abc\n", 2, {"\"abc\""}},
    {"number_with_rest", "0 0.1\n0.02 0.2x\n", 2, {"\"0.2x\""}},
    {"two_points", "0 0.1\n0.02 0.2.3\n", 2, {"\"0.2.3\""}},
    {"hexadecimal", "0 0.1\n0.02 0x10\n", 2, {"\"0x10\""}},
    {"words_after_rows", "0 0.1\n0.02 0.2\nend of file\n", 3, {"end of file"}},
    {"nan", "0 0.1\n0.02 nan\n", 2, {"\"nan\"", "finite"}},
    {"nan_first", "NaN\n0.2\n", 1, {"\"NaN\"", "finite"}, si_50hz},
    {"infinity", "0 0.1\n0.02 -inf\n", 2, {"\"-inf\"", "finite"}},
    {"overflow", "0 0.1\n0.02 1e999\n", 2, {"\"1e999\"", "finite"}},
    {"overflow_with_d", "0 0.1\n0.02 1D+999\n", 2, {"\"1D+999\"", "finite"}},
    {"time_repeated", "0 1\n0.02 2\n0.02 3\n0.04 4\n", 3, {"0.02 is repeated", "line 2"}},
    {"time_backward", "0 1\n0.02 2\n0.01 3\n", 3, {"backward", "0.01 after 0.02"}},
    {"missing_sample", "0 1\n0.02 2\n0.04 3\n0.08 4\n0.10 5\n", 4, {"1 sample(s) missing", "0.04", "0.08", "0.06"}},
    {"three_missing", "0 1\n0.02 2\n0.04 3\n0.12 4\n0.14 5\n0.16 6\n", 4, {"3 sample(s) missing", "0.06"}},
    {"missing_whole_seconds", "0 1\n1 2\n2 3\n4 4\n5 5\n", 4, {"1 sample(s) missing", "at 3"}},
    {"uneven", "0 1\n0.02 2\n0.05 3\n0.07 4\n0.09 5\n", 3, {"uneven", "0.05 follows 0.02", "0.03", "0.02 is usual"}},
    {"uneven_by_two_digits", "0.000 1\n0.020 2\n0.042 3\n0.060 4\n0.080 5\n", 3, {"uneven", "0.042"}},
    {"uneven_in_the_last_digit", "0.0000 1\n0.0200 2\n0.0403 3\n0.0600 4\n0.0800 5\n", 3, {"uneven", "0.0403"}},
    {"blank_cell", "0,0.1\n0.02,\n0.04,0.3\n", 2, {"cell 2 of 2 is blank", "\"0.02,\""}},
    {"blank_first_cell", "0;0.1\n;0.2\n", 2, {"cell 1 of 2 is blank", "\";0.2\""}},
    {"blank_line_between", "0.1\n\n0.3\n", 2, {"blank line"}, si_50hz},
    {"too_few_cells", "0 0.1\n0.02\n", 2, {"1 value(s)", "\"0.02\""}},
    {"too_many_cells", "0 0.1\n0.02 0.2 0.3\n", 2, {"3 value(s)", "\"0.02 0.2 0.3\""}},
    {"three_columns", "0 0.1 0.2\n0.02 0.2 0.3\n", 1, {"3 columns", "one component"}},
    {"fixed_width_table", "0.1 0.2 0.3 0.4 0.5\n0.6 0.7 0.8 0.9 1.0\n", 1, {"5 columns", "one component"}, si_50hz},
    {"two_column_wrap", "0.1 0.2\n-0.3 0.4\n0.5 0.6\n", 2, {"backward", "single component"}, si_50hz},
    {"two_accelerations",
     "time (s), NS (g), EW (g)\n0, 1, 2\n0.02, 1, 2\n",
     0,
     {"2 components", "\"NS\", \"EW\""},
     nothing},
    {"no_acceleration_named", "time, x, y\n0, 1, 2\n0.02, 1, 2\n", 1, {"none of them named an acceleration"}},
    {"velocity_column", "time (s), velocity (m/s)\n0, 1\n0.02, 2\n", 1, {"\"velocity (m/s)\"", "no acceleration"}},
    {"velocity_by_unit", "time (s), NS (cm/s)\n0, 1\n0.02, 2\n", 1, {"\"NS (cm/s)\"", "no acceleration"}},
    {"counts", "time (s), acceleration (counts)\n0, 1\n0.02, 2\n", 1, {"counts"}, nothing},
    {"no_unit", "0 0.1\n0.02 0.2\n", 0, {"unit of the acceleration"}, nothing},
    {"no_step", "0.1\n0.2\n", 0, {"time step"}},
    {"units_disagree", "# units: g\n0 0.1\n0.02 0.2\n", 1, {"\"g\"", "\"m/s2\""}},
    {"units_contradict", "# units: g\n# [cm/s2]\n0 0.1\n0.02 0.2\n", 2, {"\"cm/s2\"", "line 1", "\"g\""}, nothing},
    {"unit_unknown", "# units: gee\n0 0.1\n0.02 0.2\n", 1, {"\"gee\""}, nothing},
    {"unit_of_displacement", "# units: cm\n0 0.1\n0.02 0.2\n", 1, {"\"cm\"", "acceleration"}, nothing},
    {"hint_unknown", "0 0.1\n0.02 0.2\n", 0, {"\"furlong\"", "acceleration"}, {"furlong", {}, {}}},
    {"steps_disagree", "# step: 0.01 s\n0.1\n0.2\n", 1, {"0.01 s", "0.02 s"}, si_50hz},
    {"steps_contradict", "# step: 0.01 s\n# dt = 0.02 s\n0.1\n0.2\n", 2, {"0.02 s", "line 1", "0.01 s"}},
    {"step_unlike_times", "0 0.1\n0.01 0.2\n0.02 0.1\n", 0, {"0.02 s", "0.01 s"}, si_50hz},
    {"stated_step_unlike_times", "# step: 0.005 s\n0 0.1\n0.01 0.2\n0.02 0.1\n", 0, {"0.005 s", "0.01 s"}},
    {"step_zero", "# step: 0 s\n0.1\n0.2\n", 1, {"step of 0 s"}},
    {"step_negative", "0.1\n0.2\n", 0, {"-0.02 s"}, {"m/s2", -0.02, {}}},
    {"step_unreadable", "# step: fast\n0.1\n0.2\n", 1, {"\"fast\""}},
    {"step_of_length", "# step: 0.02 m\n0.1\n0.2\n", 1, {"\"m\"", "time"}},
    {"first_sample_odd", "0.1\n0.2\n", 0, {"0.01 s", "0.02 s"}, {"m/s2", 0.02, 0.01}},
    {"first_sample_disagrees", "0 0.1\n0.02 0.2\n", 0, {"0.02 s", "0 s"}, {"m/s2", {}, 0.02}},
    {"first_sample_of_shifted", "5.00 0.1\n5.02 0.2\n", 0, {"5 s"}, {"m/s2", {}, 0.0}},
    {"title_without_mark", "Invented event\nstation two\n0 0.1\n0.02 0.2\n", 2, {"\"station two\""}},
    {"heading_of_other_width",
     "time, acceleration, velocity\n0, 0.1\n0.02, 0.2\n",
     1,
     {"2 column(s)", "time, acceleration, velocity"}},
    {"decimal_comma_with_blanks", "0,00 0,1\n0,02 0,2\n", 1, {"\"0,00 0,1\"", "decimal commas need"}},
    {"decimal_signs_mixed", "0,00;0,1\n0.02;0,2\n", 2, {"\"0.02\""}},
    {"thousands", "0;1.234,5\n0.02;0.1\n", 1, {"\"1.234,5\""}},
    {"zero_bytes", std::string("0 0.1\n0.02 \0\0\n", 14), 2, {"binary", "0x00"}},
    {"utf_16",
     std::string("\xFF\xFE"
                 "0\0 \0001\0\n\0",
                 10),
     0,
     {"UTF-16"}},
    {"peer_velocity",
     peer("VELOCITY TIME SERIES IN UNITS OF CM/S", "NPTS=  2, DT= .01 SEC", "1 2"),
     3,
     {"velocity"},
     nothing},
    {"peer_displacement",
     peer("DISPLACEMENT TIME SERIES IN UNITS OF CM", "NPTS=  2, DT= .01 SEC", "1 2"),
     3,
     {"displacement"},
     nothing},
    {"peer_third_line", peer("something", "NPTS=  2, DT= .01 SEC", "1 2"), 3, {"\"something\""}, nothing},
    {"peer_fourth_line", peer(of_g, "count unknown", "1 2"), 4, {"\"count unknown\""}, nothing},
    {"peer_count", peer(of_g, "NPTS= many, DT= .01 SEC", "1 2"), 4, {"\"many\""}, nothing},
    {"peer_step", peer(of_g, "NPTS= 2, DT= .00 SEC", "1 2"), 4, {"\".00\""}, nothing},
    {"peer_milliseconds", peer(of_g, "NPTS= 2, DT= 10. MSEC", "1 2"), 4, {"\"MSEC\""}, nothing},
    {"peer_fewer", peer(of_g, "NPTS=  3, DT= .01 SEC", ".1 .2\n"), 5, {"after 2 values", "NPTS = 3"}, nothing},
    {"peer_more",
     peer(of_g, "NPTS=  3, DT= .01 SEC", ".1 .2\n.3 .4\n"),
     6,
     {"more numbers follow", "NPTS = 3"},
     nothing},
    {"peer_token", peer(of_g, "NPTS=  2, DT= .01 SEC", ".1 stop\n"), 5, {"\"stop\""}, nothing},
    {"peer_nan", peer(of_g, "NPTS=  2, DT= .01 SEC", ".1 NaN\n"), 5, {"\"NaN\""}, nothing},
    {"peer_header_only", "PEER NGA STRONG MOTION DATABASE RECORD\nx\n", 2, {"header"}, nothing},
    {"peer_unit_disagrees", peer(of_g, "NPTS=  2, DT= .01 SEC", ".1 .2\n"), 3, {"\"G\"", "\"m/s2\""}},
    {"peer_step_disagrees", peer(of_g, "NPTS=  2, DT= .01 SEC", ".1 .2\n"), 4, {"0.01 s", "0.02 s"}, {{}, 0.02, {}}},
};

class BadRecords : public testing::TestWithParam<BadRecord> {};

TEST_P(BadRecords, AreRefusedWithFileLineAndText) {
  const BadRecord& bad = GetParam();
  const WrittenFile file("record.txt", bad.content);
  try {
    const RecordFile read = read_record(file.path(), bad.hints);
    FAIL() << "read " << read.record.samples.size() << " samples every " << read.record.step << " s";
  } catch (const Error& e) {
    EXPECT_EQ(e.kind(), ErrorKind::input);
    const std::string line = bad.line == 0 ? "" : ":" + std::to_string(bad.line);
    EXPECT_EQ(e.where(), file.path().string() + line) << e.what();
    for (const std::string& text : bad.said) EXPECT_NE(std::string(e.what()).find(text), std::string::npos) << e.what();
    EXPECT_FALSE(e.remedy().empty()) << e.what();
  }
}

INSTANTIATE_TEST_SUITE_P(Refused, BadRecords, testing::ValuesIn(bad_records),
                         [](const auto& info) { return info.param.name; });

ErrorKind kind_of_reading(const std::filesystem::path& file, const std::string& said) {
  try {
    read_record(file);
  } catch (const Error& e) {
    EXPECT_NE(std::string(e.what()).find(said), std::string::npos) << e.what();
    EXPECT_NE(std::string(e.what()).find(file.string()), std::string::npos) << e.what();
    return e.kind();
  }
  ADD_FAILURE() << "no error for " << file;
  return ErrorKind::input;
}

TEST(RecordPaths, MissingFileAndFolderAreTheUsersToMend) {
  EXPECT_EQ(kind_of_reading("no/such/record.txt", "no such file"), ErrorKind::input);
  EXPECT_EQ(kind_of_reading(testing::TempDir(), "folder"), ErrorKind::input);
  EXPECT_EQ(kind_of_reading("/dev/null", "not an ordinary file"), ErrorKind::input);
}

TEST(RecordPaths, UnreadableFileIsTheMachines) {
  if (geteuid() == 0) GTEST_SKIP() << "the superuser may read everything";
  const WrittenFile file("record.txt", "0 1\n1 2\n");
  std::filesystem::permissions(file.path(), std::filesystem::perms::none);
  EXPECT_EQ(kind_of_reading(file.path(), "cannot be opened"), ErrorKind::outside);
}

}  // namespace
}  // namespace pilotis
