// The variants of the PEER header. All numbers are invented.
#include "io/records/peer.hpp"

#include <gtest/gtest.h>

#include "tests/io/records/written_file.hpp"

namespace pilotis {
namespace {

struct PeerVariant {
  std::string name, content;
};

const std::string first = "PEER NGA STRONG MOTION DATABASE RECORD\n";
const std::string event = "Invented event, station\n";
const std::string third = "ACCELERATION TIME SERIES IN UNITS OF G\n";
const std::string rows = "   .1000000E-01  -.2000000E-01   .3000000E-01\n   .4000000E-01\n";

std::string with_cr_lf(const std::string& text) {
  std::string result;
  for (char c : text) {
    if (c == '\n') result += '\r';
    result += c;
  }
  return result;
}

const PeerVariant variants[] = {
    {"usual", first + event + third + "NPTS=   4, DT=   .0050 SEC,      \n" + rows},
    {"cr_lf", with_cr_lf(first + event + third + "NPTS=   4, DT=   .0050 SEC\n" + rows)},
    {"no_padding", first + event + third + "NPTS=4, DT=.005 SEC\n" + rows},
    {"no_comma", first + event + third + "NPTS=  4  DT= .00500 SEC\n" + rows},
    {"glued_unit", first + event + third + "NPTS=  4, DT= .0050SEC\n" + rows},
    {"exponent", first + event + third + "NPTS=  4, DT= 5.0E-03 SEC\n" + rows},
    {"filter_text", first + event + third + "NPTS=  4, DT= .00500 SEC, FILTER POINTS: HP=0.1 LP=40.0 MHZ\n" + rows},
    {"lower_case", first + event + "Acceleration time series in units of g\nnpts= 4, dt= .005 sec\n" + rows},
    {"older", "PACIFIC ENGINEERING AND ANALYSIS STRONG-MOTION DATA\n" + event +
                  "ACCELERATION TIME HISTORY IN UNITS OF G. FILTER POINTS: HP=0.2 Hz LP=30.0 Hz\n"
                  "    4    0.0050    NPTS, DT\n" +
                  rows},
    {"glued_columns", first + event + third +
                          "NPTS=   4, DT=   .0050 SEC\n"
                          "  .10000000E-01-.200000000E-01 .300000000E-01\n   .4000000E-01\n"},
    {"no_gap_at_all", first + event + third +
                          "NPTS=   4, DT=   .0050 SEC\n"
                          "0.10000000E-001-.2000000E-00010.30000000E-001\n   .4000000E-01\n"},
    {"d_exponents", first + event + third + "NPTS=   4, DT=   .0050 SEC\n 1.D-2 -2.D-2 3.d-2\n4D-2\n"},
};

class PeerVariants : public testing::TestWithParam<PeerVariant> {};

TEST_P(PeerVariants, ReadAlike) {
  const WrittenFile file("record", GetParam().content);
  const RecordFile read = read_record(file.path());
  EXPECT_EQ(read.format, peer_name);
  EXPECT_EQ(read.record.step, 0.005);
  EXPECT_EQ(read.record.first_sample_at, 0);
  const std::vector<double> expected{0.01, -0.02, 0.03, 0.04};
  ASSERT_EQ(read.record.samples.size(), expected.size());
  for (std::size_t i = 0; i < expected.size(); ++i)
    EXPECT_DOUBLE_EQ(read.record.samples[i], expected[i] * 9.80665) << "sample " << i + 1;
}

INSTANTIATE_TEST_SUITE_P(Peer, PeerVariants, testing::ValuesIn(variants), [](const auto& i) { return i.param.name; });

TEST(Peer, HintsThatAgreeAreWelcome) {
  const WrittenFile file("record", variants[0].content);
  const RecordFile read = read_record(file.path(), {"g", 0.005, 0.005});
  EXPECT_EQ(read.record.first_sample_at, 0.005);
}

TEST(Peer, UnitInLineThreeIsUsed) {
  const WrittenFile file("record",
                         first + event + "ACCELERATION TIME SERIES IN UNITS OF CM/S/S\nNPTS=2, DT=.01 SEC\n1 -2\n");
  const RecordFile read = read_record(file.path());
  EXPECT_DOUBLE_EQ(read.record.samples[1], -0.02);
}

}  // namespace
}  // namespace pilotis
