// Real files of public archives, where the folder of reference values is there. TRUTH.json: values by an independent
// parser. What is no acceleration may not be read.
#include <gtest/gtest.h>

#include <cmath>
#include <fstream>
#include <map>
#include <nlohmann/json.hpp>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/record.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;
const fs::path reference = fs::path(PILOTIS_SHARED) / "reference";
const fs::path records = reference / "records";

#define NEEDS(path) \
  if (!fs::exists(path)) GTEST_SKIP() << "reference values are not there: " << (path)

nlohmann::json truth() { return nlohmann::json::parse(std::ifstream(records / "TRUTH.json")); }

// The components that TRUTH.json has of a file, in its order.
std::map<std::string, std::vector<nlohmann::json>> truth_by_file() {
  std::map<std::string, std::vector<nlohmann::json>> files;
  for (const auto& entry : truth()) files[entry["file"]].push_back(entry);
  return files;
}

// TRUTH.json writes "counts*3920/6182761 gal" and "g/10 (time,acc pairs)".
bool same_unit(const std::string& found, const std::string& expected) {
  for (const char* unit : {"gal", "g/10", "cm/s2", "mm/s2", "m/s2"})
    if (expected.find(unit) != std::string::npos)
      return si_factor(found, Dimension::acceleration, "") == si_factor(unit, Dimension::acceleration, "");
  const std::string unit = expected == "cm/s^2" ? "cm/s2" : expected;
  return si_factor(found, Dimension::acceleration, "") == si_factor(unit, Dimension::acceleration, "");
}

// Doubles printed with full digits. Ours are scaled once; K-NET's are counts whose mean (-12075.1140 and the like,
// summed without error) is taken off first: half a last place of the count, about 1e-12 gal, against the difference.
void expect_sample(double found, double expected, double of_peak) {
  EXPECT_NEAR(found, expected, 1e-14 * std::abs(expected) + of_peak);
}

void expect_truth(const RecordComponent& component, const nlohmann::json& expected, bool mean_removed) {
  SCOPED_TRACE(expected["file"].get<std::string>() + " " + expected["component"].get<std::string>());
  const Accelerogram& record = component.record;
  EXPECT_TRUE(same_unit(component.unit, expected["file_unit"])) << component.unit;
  EXPECT_DOUBLE_EQ(record.step, expected["step_s"].get<double>());
  EXPECT_EQ(record.first_sample_at, 0);
  ASSERT_EQ(record.samples.size(), expected["samples"].get<std::size_t>());
  const double slack = mean_removed ? 1e-13 : 0;  // m/s2
  const PeakSample peak = peak_of(record);
  expect_sample(peak.value, expected["peak_m_s2"], slack);
  EXPECT_EQ(std::lround(peak.time / record.step), expected["peak_index"].get<long>());
  for (int i = 0; i < 3; ++i) expect_sample(record.samples[i], expected["first3_m_s2"][i], slack);
  expect_sample(record.samples.back(), expected["last_m_s2"], slack);
}

struct Wanted {
  std::string format;
  std::vector<std::string> names;  // as the file calls them; read off the files by eye
  std::vector<double> azimuths;    // -1: none
};

const std::map<std::string, Wanted> readable = {
    {"0111a.smc", {"SMC", {"360"}, {0}}},
    {"16840_H1.cor.acc", {"ITACA .cor.acc", {"NS"}, {0}}},
    {"2-ECU.dat", {"CWB", {"U", "N", "E"}, {-1, 0, 90}}},
    {"20101114230825_3104_ap_RawAcc_E.asc", {"ESM / ITACA DYNA", {"HNE"}, {-1}}},
    {"20180212_211557_WPWS_20.V2A", {"GeoNet volume 2", {"S16W", "S74E", "Up"}, {196, 106, -1}}},
    {"5526-1.V1", {"BHRC volume 1", {"L1", "V2", "T3"}, {50, -1, 140}}},
    {"ACAC8903.101", {"ASA 2.0", {"V", "N90E", "N00E"}, {-1, 90, 0}}},
    {"AOM0011801241951.EW", {"K-NET / KiK-net", {"E-W"}, {90}}},
    {"AOM0011801241951.NS", {"K-NET / KiK-net", {"N-S"}, {0}}},
    {"AOM0011801241951.UD", {"K-NET / KiK-net", {"U-D"}, {-1}}},
    {"HL.DLFA..HNN.D.20190728.160908.C.ACC.ASC", {"ESM / ITACA DYNA", {"HNN"}, {-1}}},
    {"NGNH311106302345.NS1", {"K-NET / KiK-net", {"1"}, {-1}}},
    {"NGNH311106302345.NS2", {"K-NET / KiK-net", {"4"}, {0}}},
    {"RSN763_LOMAP_GIL067.AT2", {"PEER database header", {"67"}, {67}}},
    {"RSN763_LOMAP_GIL337.AT2", {"PEER database header", {"337"}, {337}}},
    {"SYLMOVFF.V2", {"CSMIP volume 2 (.V2)", {"90 DEG", "UP", "0 DEG"}, {90, -1, 0}}},
    {"altohospicio0911131.v1", {"CSMIP volume 1 (.V1)", {"EW", "NS", "V"}, {90, 0, -1}}},
    {"ce36456p_CE36456.V2", {"CSMIP volume 2 (.V2)", {"90 DEG", "UP", "0 DEG"}, {90, -1, 0}}},
    {"np01002p_4225a_a.smc", {"SMC", {"133"}, {133}}},
    {"ua0004.dat", {"CSMNC", {"EW"}, {90}}},
    {"us1000hyfh_akbmrp_AKBMR--n.1000hyfh.BNZ.--.acc.V2c", {"COSMOS v1.20", {"BNZ"}, {-1}}},
};

TEST(Archives, EveryRecordReadsToTheTruth) {
  NEEDS(records / "TRUTH.json");
  int checked = 0;
  for (const auto& [name, expected] : truth_by_file()) {
    if (expected.front()["file_unit"] == "counts") continue;  // refused, below
    SCOPED_TRACE(name);
    ASSERT_TRUE(readable.contains(name)) << name << " is new: say here what it is";
    const Wanted& wanted = readable.at(name);
    const FileOfRecords read = read_record_file(records / name);
    EXPECT_EQ(read.format, wanted.format);
    ASSERT_EQ(read.components.size(), expected.size());
    for (std::size_t i = 0; i < expected.size(); ++i) {
      EXPECT_EQ(read.components[i].name, wanted.names[i]);
      EXPECT_EQ(read.components[i].azimuth.value_or(-1), wanted.azimuths[i]);
      expect_truth(read.components[i], expected[i], wanted.format.starts_with("K-NET"));
      ++checked;
    }
  }
  EXPECT_EQ(checked, 35);  // entries of TRUTH.json but the one of raw counts
}

// What the message must say of each file that is no acceleration.
const std::map<std::string, std::string> refusals = {
    {"16840_H1.rs", "response spectra"},
    {"NP8040-n.1000hyfh.HNE.01.V0c", "raw counts"},
    {"RSN164_IMPVALL.H_H-CPE147.VT2", "velocity"},
    {"SYLMOVFF.V3", "response spectra"},
    {"TRUTH.json", "\"[\""},
};

// With every hint given, so that only the content can stop it.
TEST(Archives, EveryOtherFileIsRefusedForWhatItIs) {
  NEEDS(records);
  for (const auto& entry : fs::directory_iterator(records)) {
    const std::string name = entry.path().filename();
    if (readable.contains(name)) continue;
    ASSERT_TRUE(refusals.contains(name)) << name << " is new: say here what becomes of it";
    try {
      read_record_file(entry.path(), {"cm/s2", 0.01, 0.0});
      ADD_FAILURE() << name << " was read";
    } catch (const Error& e) {
      EXPECT_EQ(e.kind(), ErrorKind::input);
      EXPECT_NE(std::string(e.what()).find(refusals.at(name)), std::string::npos) << e.what();
    }
  }
}

// A real file cut anywhere must not be read as a shorter or another record: at every hundredth of its length, the cut
// file is refused. (Where only trailing blanks or end marks are cut, the numbers are whole; the last hundredth is left
// out.)
TEST(Archives, CutFilesAreRefused) {
  NEEDS(records);
  for (const auto& [name, wanted] : readable) {
    std::ifstream stream(records / name, std::ios::binary);
    const std::string whole((std::istreambuf_iterator<char>(stream)), std::istreambuf_iterator<char>());
    const std::size_t length = whole.find('\x1A') == std::string::npos ? whole.size() : whole.find('\x1A');
    for (std::size_t part = 1; part < 99; ++part) {
      const std::string_view cut = std::string_view(whole).substr(0, length * part / 100);
      EXPECT_THROW(read_record_content(cut, name), Error) << name << " cut at " << part << " %";
    }
  }
}

TEST(Archives, MiniSeedIsRefusedForWhatItIs) {
  const std::string made =
      std::string("000001D STA  00BHENW\x07\xE3\x00\xD1\x10\x09\x08\x00", 28) + std::string(484, '\0');
  try {
    read_record_content(made, "made.mseed", {"cm/s2", 0.01, 0.0});
    ADD_FAILURE() << "it was read";
  } catch (const Error& e) {
    EXPECT_NE(std::string(e.what()).find("miniSEED"), std::string::npos) << e.what();
    EXPECT_NE(e.problem().find("scale"), std::string::npos) << e.what();
    EXPECT_NE(e.remedy().find("as text"), std::string::npos) << e.what();
  }
}

// The file's own facts: its comment says 1559 values in g every 0.02 s, the first at 0.02 s. The peak is the largest of
// its numbers as `sort` finds it: 0.31882 g, the 102nd.
TEST(Archives, ElCentroAsTheStudyDescribesIt) {
  const fs::path file = reference / "elcentro-1940-ns.txt";
  NEEDS(file);
  const RecordFile read = read_record(file, {"g", 0.02, 0.02});
  EXPECT_EQ(read.record.samples.size(), 1559u);
  EXPECT_EQ(read.record.step, 0.02);
  EXPECT_EQ(read.record.first_sample_at, 0.02);
  EXPECT_DOUBLE_EQ(read.record.samples[0], 0.00630 * 9.80665);
  EXPECT_DOUBLE_EQ(std::abs(peak_of(read.record).value), 0.31882 * 9.80665);
  EXPECT_NEAR(peak_of(read.record).time, 2.04, 1e-9);
  EXPECT_THROW(read_record(file, {"g", {}, {}}), Error);   // nobody says the step
  EXPECT_THROW(read_record(file, {{}, 0.02, {}}), Error);  // nobody says the unit
}

}  // namespace
}  // namespace pilotis
