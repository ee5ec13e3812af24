// Real files of public archives, where the folder of reference values is there. TRUTH.json: values by an independent
// parser. Nothing that is not read yet may be misread.
#include <gtest/gtest.h>

#include <cmath>
#include <fstream>
#include <map>
#include <nlohmann/json.hpp>
#include <set>

#include "core/error.hpp"
#include "io/records/record.hpp"
#include "io/records/unread.hpp"
#include "tests/io/records/written_file.hpp"

namespace pilotis {
namespace {

namespace fs = std::filesystem;
const fs::path reference = fs::path(PILOTIS_SHARED) / "reference";
const fs::path records = reference / "records";

#define NEEDS(path) \
  if (!fs::exists(path)) GTEST_SKIP() << "reference values are not there: " << (path)

// Doubles printed with full digits; our factor g is applied once: two roundings.
void expect_value(double found, double expected) { EXPECT_NEAR(found, expected, 1e-14 * std::abs(expected)); }

TEST(Archives, PeerFilesReadToTheTruth) {
  NEEDS(records / "TRUTH.json");
  const auto truth = nlohmann::json::parse(std::ifstream(records / "TRUTH.json"));
  int checked = 0;
  for (const auto& entry : truth) {
    const std::string name = entry["file"];
    if (!name.ends_with(".AT2")) continue;
    const RecordFile read = read_record(records / name);
    EXPECT_EQ(read.format, "PEER database header");
    EXPECT_EQ(read.unit, "G");
    EXPECT_EQ(read.record.step, entry["step_s"].get<double>());
    EXPECT_EQ(read.record.first_sample_at, 0);
    ASSERT_EQ(read.record.samples.size(), entry["samples"].get<std::size_t>());
    const PeakSample peak = peak_of(read.record);
    expect_value(peak.value, entry["peak_m_s2"]);
    EXPECT_EQ(std::lround(peak.time / read.record.step), entry["peak_index"].get<long>());
    for (int i = 0; i < 3; ++i) expect_value(read.record.samples[i], entry["first3_m_s2"][i]);
    expect_value(read.record.samples.back(), entry["last_m_s2"]);
    ++checked;
  }
  EXPECT_EQ(checked, 2);
}

// What the message must call each file.
const std::map<std::string, std::string> refusals = {
    {"0111a.smc", "SMC"},
    {"16840_H1.cor.acc", "ITACA .cor.acc"},
    {"16840_H1.rs", "response spectra"},
    {"2-ECU.dat", "CWB"},
    {"20101114230825_3104_ap_RawAcc_E.asc", "ESM / ITACA DYNA"},
    {"20180212_211557_WPWS_20.V2A", "GeoNet"},
    {"5526-1.V1", "BHRC"},
    {"ACAC8903.101", "ASA 2.0"},
    {"AOM0011801241951.EW", "K-NET"},
    {"AOM0011801241951.NS", "K-NET"},
    {"AOM0011801241951.UD", "K-NET"},
    {"HL.DLFA..HNN.D.20190728.160908.C.ACC.ASC", "ESM / ITACA DYNA"},
    {"NGNH311106302345.NS1", "K-NET / KiK-net"},
    {"NGNH311106302345.NS2", "K-NET / KiK-net"},
    {"NP8040-n.1000hyfh.HNE.01.V0c", "COSMOS"},
    {"RSN164_IMPVALL.H_H-CPE147.VT2", "velocity"},
    {"SYLMOVFF.V2", "volume 2"},
    {"SYLMOVFF.V3", "volume 3"},
    {"TRUTH.json", "\"[\""},
    {"altohospicio0911131.v1", "volume 1"},
    {"ce36456p_CE36456.V2", "volume 2"},
    {"np01002p_4225a_a.smc", "SMC"},
    {"ua0004.dat", "CSMNC"},
    {"us1000hyfh_akbmrp_AKBMR--n.1000hyfh.BNZ.--.acc.V2c", "COSMOS"},
};

// With every hint given, so that only the content can stop it.
TEST(Archives, EveryOtherFileIsRefusedByItsName) {
  NEEDS(records);
  for (const auto& entry : fs::directory_iterator(records)) {
    const std::string name = entry.path().filename();
    if (name.ends_with(".AT2")) continue;
    ASSERT_TRUE(refusals.contains(name)) << name << " is new: say here what becomes of it";
    try {
      read_record(entry.path(), {"cm/s2", 0.01, 0.0});
      ADD_FAILURE() << name << " was read";
    } catch (const Error& e) {
      EXPECT_EQ(e.kind(), ErrorKind::input);
      EXPECT_NE(std::string(e.what()).find(refusals.at(name)), std::string::npos) << e.what();
    }
  }
}

// AFAD and miniSEED are not among the files: their marks, from the archives' own descriptions.
TEST(Archives, FormatsWithoutAFileAreRefusedByTheirMarks) {
  const std::map<std::string, std::string> made = {
      {"AFAD", "STRONG GROUND MOTION RECORDS OF TURKIYE\r\nPLACE : \xC7\r\n1.0 2.0 3.0\r\n"},
      {"miniSEED", std::string("000001D STA  00BHENW\x07\xE3\x00\xD1\x10\x09\x08\x00", 28) + std::string(484, '\0')},
  };
  for (const auto& [name, content] : made) {
    const WrittenFile file("record", content);
    try {
      read_record(file.path(), {"cm/s2", 0.01, 0.0});
      ADD_FAILURE() << name << " was read";
    } catch (const Error& e) {
      EXPECT_NE(std::string(e.what()).find(name), std::string::npos) << e.what();
      EXPECT_NE(e.remedy().find("two-column text"), std::string::npos) << e.what();
    }
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
