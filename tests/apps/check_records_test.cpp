// What `pilotis check` tells of a record, as a shell sees it. The records are invented.
#include <gtest/gtest.h>
#include <sys/wait.h>

#include <array>
#include <cstdio>
#include <nlohmann/json.hpp>

#include "tests/io/records/written_file.hpp"
#include "tests/support/invented_records.hpp"

namespace pilotis {
namespace {

struct Ran {
  int status = -1;
  std::string output;
};

// With `streams` "2>&1" for both, "2>/dev/null" for standard output alone.
Ran check(const std::string& arguments, const std::string& streams) {
  Ran ran;
  FILE* pipe = ::popen((std::string(PILOTIS_PROGRAM) + " check " + arguments + " " + streams).c_str(), "r");
  std::array<char, 4096> buffer;
  for (std::size_t n; (n = std::fread(buffer.data(), 1, buffer.size(), pipe)) > 0;) ran.output.append(buffer.data(), n);
  ran.status = WEXITSTATUS(::pclose(pipe));
  return ran;
}

const Samples few{1, -2, 3, -4};

TEST(CheckRecord, ListsEveryComponent) {
  const WrittenFile file("three.V2A", invented_geonet(few));
  const Ran ran = check(file.path().string(), "2>&1");
  EXPECT_EQ(ran.status, 0);
  for (const char* said : {"GeoNet volume 2", "S16W", "196", "S74E", "106", "Up", "mm/s/s", "-0.004", "0.06"})
    EXPECT_NE(ran.output.find(said), std::string::npos) << said << " is not in\n" << ran.output;
}

TEST(CheckRecord, AsJsonInSi) {
  const WrittenFile file("two.V2", invented_csmip_volume2(few));
  const Ran ran = check("--json " + file.path().string(), "2>/dev/null");
  EXPECT_EQ(ran.status, 0);
  const auto told = nlohmann::json::parse(ran.output).at(0);
  EXPECT_EQ(told.at("kind"), "record");
  EXPECT_EQ(told.at("format"), "CSMIP volume 2 (.V2)");
  ASSERT_EQ(told.at("components").size(), 2u);
  const auto& first = told.at("components").at(0);
  EXPECT_EQ(first.at("name"), "90 Deg");
  EXPECT_EQ(first.at("channel"), 1);
  EXPECT_EQ(first.at("azimuth_deg"), 90);
  EXPECT_EQ(first.at("samples"), 4);
  EXPECT_EQ(first.at("step_s"), 0.01);
  EXPECT_DOUBLE_EQ(first.at("duration_s"), 0.03);
  EXPECT_EQ(first.at("unit_in_file"), "cm/sec2");
  EXPECT_DOUBLE_EQ(first.at("peak_m_per_s2"), -0.04);
  EXPECT_DOUBLE_EQ(first.at("peak_at_s"), 0.03);
  EXPECT_FALSE(told.at("components").at(1).contains("azimuth_deg"));
}

TEST(CheckRecord, SaysWhatIsNoAccelerogram) {
  const WrittenFile file("one.asc", with(invented_esm_dyna(few), "DATA_TYPE: ACCELERATION", "DATA_TYPE: VELOCITY"));
  const Ran ran = check(file.path().string(), "2>&1");
  EXPECT_EQ(ran.status, 2);
  EXPECT_NE(ran.output.find("VELOCITY"), std::string::npos) << ran.output;
}

}  // namespace
}  // namespace pilotis
