// The traps of the archives' formats, one invented file each.
#include <gtest/gtest.h>

#include <cmath>

#include "core/error.hpp"
#include "io/records/record.hpp"
#include "tests/support/invented_records.hpp"

namespace pilotis {
namespace {

const Samples few{1, -2, 3, -4};  // in the unit of the format; mean -0.5

struct GoodTrap {
  std::string name, content;
  std::size_t components;
  double step;        // s
  Samples first;      // of the first component, m/s2
  std::string noted;  // some note holds this
  RecordHints hints = {};
};

std::string cosmos(const std::string& from, const std::string& to) { return with(invented_cosmos(few), from, to); }
std::string volume2(const std::string& from, const std::string& to) {
  return with(invented_csmip_volume2(few), from, to);
}
std::string smc(const std::string& from, const std::string& to) { return with(invented_smc(few), from, to); }
const std::string smc_row = " 1.0000E+0-2.0000E+0 3.0000E+0-4.0000E+0\n";
const std::string smc_rate = "  0.1700000E+39  1.0000000E+02";  // Real(1) and Real(2)
const std::string smc_no_rate = "  0.1700000E+39  0.1700000E+39";
std::string smc_pairs(const std::string& row) {
  const std::string peaks = with(smc(smc_rate, smc_no_rate), "  3.0000000E+00", "  0.1700000E+39");
  return with(with(peaks, " -4.0000000E+00", "  0.1700000E+39"), smc_row, row);
}
std::string first_channel(const std::string& text) { return text.substr(0, text.find("Corrected", 1)); }
const std::string volume2_line = "    4 points of accel data equally spaced at  .010 sec, in cm/sec2. (8f10.3)";
const std::string volume2_row = "     1.000    -2.000     3.000    -4.000\n";
std::string pairs(const std::string& row) {
  return with(invented_csmip_volume1_pairs(few), "  0.000  1.000  0.010 -2.000  0.020  3.000  0.030 -4.000\n", row);
}
const Samples cm{0.01, -0.02, 0.03, -0.04};
const Samples tenth_g{0.980665, -1.96133, 2.941995, -3.92266};

const std::vector<GoodTrap> good_traps = {
    {"peer_file_that_is_a_bare_table", "0.00,0.1\n0.01,-0.2\n", 1, 0.01, {0.980665, -1.96133}, "", {"g", {}, {}}},
    {"cosmos_two_channels", invented_cosmos(few) + invented_cosmos(few), 2, 0.01, cm, ""},
    {"cosmos_ends_with_the_other_mark", cosmos("End-of-data for ChanHNE", "/& end of data for ChanHNE"), 1, 0.01, cm,
     ""},
    {"cosmos_one_value_a_line",
     with(cosmos("(8f10.4)", "(1E15.6)"), "    1.0000   -2.0000    3.0000   -4.0000\n",
          "   1.000000e+00\n  -2.000000e+00\n   3.000000e+00\n  -4.000000e+00\n"),
     1, 0.01, cm, ""},
    {"cosmos_ten_values_a_line",
     with(cosmos("(8f10.4)", "(10f8.3)"), "    1.0000   -2.0000    3.0000   -4.0000\n",
          "   1.000  -2.000   3.000  -4.000\n"),
     1, 0.01, cm, ""},
    {"cosmos_in_g", cosmos("units=cm/sec2(04)", "units=g(02)"), 1, 0.01, {9.80665, -19.6133, 29.41995, -39.2266}, ""},
    {"cosmos_velocity_is_passed_over",
     cosmos("End-of-data",
            "       4 velocity     pts, approx  210 secs, units=cm/sec(05),Format=(8f10.4)\n"
            "    9.0000    9.0000    9.0000    9.0000\nEnd-of-data"),
     1, 0.01, cm, ""},
    {"volume2_in_capitals",
     volume2(volume2_line, "    4 POINTS OF ACCEL DATA EQUALLY SPACED AT  .010 SEC.  (UNITS: CM/SEC/SEC)"), 2, 0.01, cm,
     ""},
    {"volume2_without_unit", volume2(volume2_line, "    4 POINTS OF ACC DATA EQUALLY SPACED AT  .010 SEC."), 2, 0.01,
     cm, "taken as cm/s2"},
    {"volume2_unit_by_the_study",
     first_channel(volume2(volume2_line, "    4 POINTS OF ACC DATA EQUALLY SPACED AT  .010 SEC.")),
     1,
     0.01,
     {9.80665, -19.6133, 29.41995, -39.2266},
     "",
     {"g", {}, {}}},
    {"volume2_glued_header", volume2("1304313043    0    0", "130431304313043-9999"), 2, 0.01, cm, ""},
    {"volume2_counts_differ_by_channel", first_channel(invented_csmip_volume2(few)) + invented_csmip_volume2({1, 2, 3}),
     3, 0.01, cm, ""},
    {"volume2_peak_without_sign", volume2("Peak acceleration =    -4.000", "Peak acceleration =     4.000"), 2, 0.01,
     cm, ""},
    {"volume2_peak_of_other_sign",
     with(invented_csmip_volume2({1, 2, 3, 4}), "Peak acceleration =     4.000", "Peak acceleration =    -4.000"),
     2,
     0.01,
     {0.01, 0.02, 0.03, 0.04},
     "opposite sign"},
    {"volume2_peak_a_little_off", volume2("Peak acceleration =    -4.000", "Peak acceleration =    -4.200"), 2, 0.01,
     cm, "states a peak of -4.2"},
    {"volume1_times_jitter_by_a_digit", pairs("  0.000  1.000  0.010 -2.000  0.021  3.000  0.030 -4.000\n"), 1, 0.01,
     tenth_g, ""},
    // By hand: the usual steps below the median spacing of 0.01 s; at 0.01 s between 0 and 0.02 s half of 1 and 3.
    {"volume1_uneven_times",
     pairs("  0.000  1.000  0.020  3.000  0.030 -4.000  0.040 -2.000\n"),
     1,
     0.01,
     {0.980665, 1.96133, 2.941995, -3.92266, -1.96133},
     "straight lines between 4 pairs"},
    {"volume1_uneven_at_a_stated_step",
     pairs("  0.000  1.000  0.020  3.000  0.030 -4.000  0.040 -2.000\n"),
     1,
     0.02,
     {0.980665, 2.941995, -1.96133},
     "straight lines",
     {{}, 0.02, {}}},
    {"smc_five_columns_of_14", smc(smc_row, " 1.0000000E+00-2.0000000E+00 3.0000000E+00-4.0000000E+00\n"), 1, 0.01, cm,
     ""},
    {"smc_numbers_after_the_count", smc(smc_row, smc_row + " 9.0000E+0 9.0000E+0\n"), 1, 0.01, cm, "left out"},
    {"smc_more_numbers_on_the_last_row", smc("-4.0000E+0\n", "-4.0000E+0 9.0000E+0\n"), 1, 0.01, cm, "left out"},
    {"smc_pairs_of_even_times", smc_pairs(" 0.0000E+0 1.0000E+0 1.0000E-2-2.0000E+0\n"), 1, 0.01, {0.01, -0.02}, ""},
    {"smc_pairs_with_a_repeated_time",
     with(smc_pairs(" 0.0000E+0 1.0000E+0 1.0000E-2-2.0000E+0 1.0000E-2-3.0000E+0 2.0000E-2-4.0000E+0\n"),
          "         4    -32768", "         8    -32768"),
     1,
     0.01,
     {0.01, -0.03, -0.04},
     "repeated"},
    {"smc_of_unknown_quantity", smc("2 CORRECTED ACCELEROGRAM", "0 UNKNOWN"), 1, 0.01, cm, "", {"cm/s2", {}, {}}},
    {"knet_label_without_dots",
     with(invented_knet({1000, -2000, 1000}), "Max. Acc. (gal)", "Max Acc. (gal)"),
     1,
     0.01,
     {0.01, -0.02, 0.01},
     ""},
    {"knet_mean_is_taken_off",
     with(invented_knet({1000, -2000, 3000, -4000}), "4.000", "3.500"),
     1,
     0.01,
     {0.015, -0.015, 0.035, -0.035},
     "mean"},
    {"kiknet_borehole", with(invented_knet({1000, -2000, 1000}), "E-W", "2"), 1, 0.01, {0.01, -0.02, 0.01}, "borehole"},
    {"dyna_without_unit", with(invented_esm_dyna(few), "UNITS: cm/s^2", "UNITS: "), 1, 0.01, cm, "", {"cm/s2", {}, {}}},
    {"dyna_without_peak", with(invented_esm_dyna(few), "PGA_CM/S^2: -4.000000", "PGA_CM/S^2: "), 1, 0.01, cm, ""},
    {"asa_one_row_more", invented_asa(few) + "      9.00      9.00      9.00\n", 3, 0.01, cm, "1 row(s)"},
    {"asa_two_rows_more", invented_asa(few) + "      9.00      9.00      9.00\n      9.00      9.00      9.00\n", 3,
     0.01, cm, "2 row(s)"},
    {"plain_comments_of_every_mark",
     "# a\n% b\n* c\n| d\n/ e\n0 1\n0.01 -2\n",
     1,
     0.01,
     {0.01, -0.02},
     "",
     {"cm/s2", {}, {}}},
};

class GoodTraps : public testing::TestWithParam<GoodTrap> {};

TEST_P(GoodTraps, AreReadAsMeant) {
  const GoodTrap& trap = GetParam();
  const FileOfRecords file = read_record_content(trap.content, "made", trap.hints);
  ASSERT_EQ(file.components.size(), trap.components);
  const RecordComponent& first = file.components.front();
  EXPECT_DOUBLE_EQ(first.record.step, trap.step);
  ASSERT_EQ(first.record.samples.size(), trap.first.size());
  for (std::size_t i = 0; i < trap.first.size(); ++i)
    EXPECT_NEAR(first.record.samples[i], trap.first[i], 4e-16 * std::abs(trap.first[i])) << "sample " << i + 1;
  std::string notes;
  for (const std::string& note : file.notes) notes += note + "\n";
  for (const std::string& note : first.notes) notes += note + "\n";
  EXPECT_NE(notes.find(trap.noted), std::string::npos) << notes;
}

INSTANTIATE_TEST_SUITE_P(Read, GoodTraps, testing::ValuesIn(good_traps), [](const auto& i) { return i.param.name; });

struct BadTrap {
  std::string name, content;
  std::vector<std::string> said;
  RecordHints hints = {};
};

const std::string absurd = "1000000000000000000";  // 1e18

const std::vector<BadTrap> bad_traps = {
    {"cosmos_counts", cosmos("units=cm/sec2(04)", "units= counts(50)"), {"made:48", "raw counts"}},
    {"cosmos_missing_value", cosmos("   -2.0000", " -999.0000"), {"made:49", "value 2", "missing"}},
    {"cosmos_no_step", cosmos("      10.000000", "    -999.000000"), {"time step"}},
    {"cosmos_unit_against_code", cosmos("(04)", "(02)"), {"\"cm/sec2\"", "02"}},
    {"cosmos_only_velocity", cosmos("acceleration pts", "velocity     pts"), {"velocity"}},
    {"cosmos_no_end_mark", cosmos("End-of-data for ChanHNE acceleration\n", ""), {"cut off"}},
    {"cosmos_fewer", cosmos("       4 acceleration", "       5 acceleration"), {"has only 4", "line 48", "5 samples"}},
    {"cosmos_more", cosmos("       4 acceleration", "       3 acceleration"), {"made:49", "3 samples"}},
    {"cosmos_absurd", cosmos("       4 acceleration", absurd + " acceleration"), {"made:48", absurd}},
    {"cosmos_other_peak", cosmos("      -4.000000", "     -40.000000"), {"peak of -40 cm/sec2", "-4 cm/sec2"}},
    {"cosmos_field_cut", cosmos("   -4.0000\n", "   -4.00\n"), {"made:49", "characters"}},
    {"volume2_fewer", volume2(volume2_line, "    5" + volume2_line.substr(5)), {"has only 4", "5 samples"}},
    {"volume2_more", volume2(volume2_line, "    3" + volume2_line.substr(5)), {"3 samples"}},
    {"volume2_absurd", volume2(volume2_line, absurd + volume2_line.substr(5)), {absurd}},
    {"volume2_count_too_long", volume2(volume2_line, absurd + "00" + volume2_line.substr(5)), {absurd + "00"}},
    {"volume2_step_zero", volume2("at  .010 sec, in cm/sec2", "at  .000 sec, in cm/sec2"), {"\".000\"", "time step"}},
    {"volume2_other_unit", volume2("in cm/sec2", "in cm/sec"), {"acceleration"}},
    {"volume2_unit_unlike_study", invented_csmip_volume2(few), {"\"g\""}, {"g", {}, {}}},
    {"volume2_step_unlike_study", invented_csmip_volume2(few), {"0.01 s", "0.02 s"}, {{}, 0.02, {}}},
    {"volume2_other_peak", volume2("Peak acceleration =    -4.000", "Peak acceleration =   -40.000"), {"-40", "-4"}},
    {"volume2_blank_field", volume2(volume2_row, "     1.000               3.000    -4.000\n"), {"blank field"}},
    {"volume2_shifted_row", volume2(volume2_row, "    1.000    -2.000     3.000    -4.000\n"), {"characters"}},
    {"volume2_text_at_the_end", with(invented_csmip_volume2(few), "\x1A\x1A\x1A", "rest\n"), {"\"rest\""}},
    {"volume2_text_behind_control_z", invented_csmip_volume2(few) + "rest\n", {"control-Z"}},
    {"volume2_stops_in_velocity",
     [] {
       const std::string text = invented_csmip_volume2(few);
       return text.substr(0, text.find("points of displ") - 46);
     }(),
     {"made:"}},
    {"volume1_time_backward",
     pairs("  0.000  1.000  0.010 -2.000  0.005  3.000  0.030 -4.000\n"),
     {"backward", "0.005"}},
    {"volume1_far_time", pairs("  0.000  1.000  0.010 -2.000  0.020  3.000999.000 -4.000\n"), {"999", "damaged"}},
    {"volume1_pairs_fewer",
     with(invented_csmip_volume1_pairs(few), "points =      4", "points =      5"),
     {"has only 8"}},
    {"volume1_no_rate", with(invented_csmip_volume1(few), "pts/sec", "whatever"), {"pts/sec"}},
    {"smc_velocity", smc("2 CORRECTED ACCELEROGRAM", "3 VELOCITY"), {"made:1", "velocity"}},
    {"smc_displacement", smc("2 CORRECTED ACCELEROGRAM", "4 DISPLACEMENT"), {"displacement"}},
    {"smc_unknown_without_unit", smc("2 CORRECTED ACCELEROGRAM", "0 UNKNOWN"), {"unknown", "units = "}},
    {"smc_no_count", smc("         4    -32768", "    -32768    -32768"), {"number of samples"}},
    {"smc_fewer", smc("         4    -32768", "         5    -32768"), {"made:"}},
    {"smc_absurd", smc("         4    -32768", "9999999999    -32768"), {"9999999999"}},
    {"smc_comments_absurd", smc("|invented\n", ""), {"made:"}},
    {"smc_odd_pairs",
     with(smc_pairs(" 0.0000E+0 1.0000E+0 1.0000E-2\n"), "         4    -32768", "         3    -32768"),
     {"pairs"}},
    {"smc_peak", smc(" -4.0000000E+00", " -4.0000000E+02"), {"-400", "-4"}},
    {"knet_fewer",
     with(invented_knet(few), "Duration Time(s)  0.04", "Duration Time(s)  0.05"),
     {"after 4", "5 samples"}},
    {"knet_more", with(invented_knet(few), "Duration Time(s)  0.04", "Duration Time(s)  0.03"), {"3 samples"}},
    {"knet_absurd", with(invented_knet(few), "Duration Time(s)  0.04", "Duration Time(s)  1e16"), {absurd}},
    {"knet_no_scale", with(invented_knet(few), "2000(gal)/2000000", "2000"), {"\"Scale Factor      2000\""}},
    {"knet_scale_zero", with(invented_knet(few), "2000(gal)/2000000", "2000(gal)/0"), {"above 0"}},
    {"knet_rate_zero", with(invented_knet(few), "100Hz", "0Hz"), {"above 0"}},
    {"dyna_velocity", with(invented_esm_dyna(few), "DATA_TYPE: ACCELERATION", "DATA_TYPE: VELOCITY"), {"VELOCITY"}},
    {"dyna_no_unit", with(invented_esm_dyna(few), "UNITS: cm/s^2", "UNITS: "), {"unit of the acceleration"}},
    {"dyna_fewer", with(invented_esm_dyna(few), "NDATA: 4", "NDATA: 5"), {"after 4", "line 30", "5 samples"}},
    {"dyna_more", with(invented_esm_dyna(few), "NDATA: 4", "NDATA: 3"), {"3 samples"}},
    {"dyna_absurd", with(invented_esm_dyna(few), "NDATA: 4", "NDATA: " + absurd), {"made:30", absurd}},
    {"dyna_count_negative", with(invented_esm_dyna(few), "NDATA: 4", "NDATA: -4"), {"\"-4\""}},
    {"dyna_step_negative", with(invented_esm_dyna(few), "S: 0.010000", "S: -0.01"), {"\"-0.01\""}},
    {"itaca_velocity",
     with(invented_itaca(few), "Accelaration time series in m/s/s", "Velocity time series in m/s"),
     {"Velocity"}},
    {"itaca_fewer", with(invented_itaca(few), "Data                : 4", "Data                : 5"), {"has only 4"}},
    {"itaca_more", with(invented_itaca(few), "Data                : 4", "Data                : 3"), {"3 samples"}},
    {"geonet_volume1", with(invented_geonet(few), "Corrected", "Uncorrected"), {"uncorrected"}},
    {"geonet_fewer", with(invented_geonet(few), "       4       4       4", "       5       4       4"), {"made:"}},
    {"geonet_other_peak", with(invented_geonet(few), "peak     -4.0 mm/s/s", "peak    -40.0 mm/s/s"), {"-40 mm/s/s"}},
    {"afad_fewer", with(invented_afad(few), "DATA            : 4", "DATA            : 5"), {"after 12"}},
    {"afad_short_row",
     with(invented_afad(few), "     -4.0000     -4.0000     -4.0000", "     -4.0000     -4.0000"),
     {"has only 2"}},
    {"afad_absurd", with(invented_afad(few), "DATA            : 4", "DATA            : " + absurd), {absurd}},
    {"asa_three_rows_more",
     invented_asa(few) +
         "      9.00      9.00      9.00\n      9.00      9.00      9.00\n      9.00      9.00      9.00\n",
     {"3 rows follow"}},
    {"asa_fewer", with(invented_asa(few), "/4/4/4", "/5/5/5"), {"after 12"}},
    {"asa_channels",
     with(invented_asa(few), "CANALES                      : 3", "CANALES                      : 2"),
     {"2 channels"}},
    {"asa_thirteen_channels",
     with(invented_asa(few), "CANALES                      : 3", "CANALES                      : 13"),
     {"\"13\""}},
    {"cwb_other_rate",
     with(with(invented_cwb(few), "#SampleRate(Hz): 100", "#SampleRate(Hz): 50"), "(sec): 0.04", "(sec): 0.08"),
     {"0.02 s", "0.01 s"}},
    {"cwb_other_length",
     with(invented_cwb(few), "#RecordLength(sec): 0.04", "#RecordLength(sec): 60"),
     {"4 rows", "60 s"}},
    {"cwb_repeated_time", with(invented_cwb(few), "     0.020", "     0.010"), {"0.01 is repeated"}},
    {"bhrc_other_rate", with(invented_bhrc(Samples(300, 1)), "1.000000E+02", "5.000000E+01"), {"duration", "6 s"}},
    {"bhrc_no_end_mark", invented_bhrc(few).substr(0, invented_bhrc(few).size() - 3), {"/&"}},
    {"csmnc_velocity",
     with(invented_csmnc(few), "UNCORRECTED ACCELERATION          UNIT: CM/SEC/SEC",
          "UNCORRECTED VELOCITY   UNIT: CM/SEC"),
     {"VELOCITY"}},
    {"csmnc_fewer", with(invented_csmnc(few), "POINTS:     4", "POINTS:     5"), {"after 4"}},
    {"csmnc_more", with(invented_csmnc(few), "POINTS:     4", "POINTS:     3"), {"3 samples"}},
    {"plain_row_of_one_component", "0.1 0.2 0.3 0.4 0.5\n0.6 0.7 0.8 0.9 1.0\n", {"5 columns"}, {"g", 0.01, {}}},
    {"plain_text_behind_control_z", "0 0.1\n0.02 -0.2\n\x1A\n0.04 0.3\n", {"control-Z"}, {"g", {}, {}}},
};

class BadTraps : public testing::TestWithParam<BadTrap> {};

TEST_P(BadTraps, AreRefusedSayingWhatAndWhere) {
  const BadTrap& trap = GetParam();
  try {
    const FileOfRecords file = read_record_content(trap.content, "made", trap.hints);
    ADD_FAILURE() << "read as " << file.format << ", " << file.components.front().record.samples.size() << " samples";
  } catch (const Error& error) {
    EXPECT_EQ(error.kind(), ErrorKind::input);
    EXPECT_TRUE(error.where().starts_with("made")) << error.what();
    EXPECT_FALSE(error.remedy().empty()) << error.what();
    for (const std::string& text : trap.said)
      EXPECT_NE(std::string(error.what()).find(text), std::string::npos) << text << ": " << error.what();
  }
}

INSTANTIATE_TEST_SUITE_P(Refused, BadTraps, testing::ValuesIn(bad_traps), [](const auto& i) { return i.param.name; });

}  // namespace
}  // namespace pilotis
