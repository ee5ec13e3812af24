// Which component is meant, and which way it points. All records are invented.
#include "io/records/components.hpp"

#include <gtest/gtest.h>

#include "core/error.hpp"
#include "tests/io/records/written_file.hpp"
#include "tests/support/invented_records.hpp"

namespace pilotis {
namespace {

// Compass bearings are counted from north or south toward east or west, as in surveying.
TEST(Azimuth, IsReadFromNames) {
  const std::vector<std::pair<std::string, double>> named{
      {"90 DEG", 90}, {"  0 Deg", 0}, {"360", 0},     {"N35E", 35}, {"S16W", 196}, {"S74E", 106},
      {"N10W", 350},  {"N90E", 90},   {"N-S", 0},     {"E-W", 90},  {"ew", 90},    {"S", 180},
      {"147", 147},   {"-90", 270},   {"N 35 E", 35}, {"N00E", 0},  {"West", -1},  {"UP", -1},
      {"HNE", -1},    {"V", -1},      {"", -1},       {"N95E", -1}, {"1e999", -1}, {"acceleration", -1},
  };
  for (const auto& [name, azimuth] : named) EXPECT_EQ(azimuth_of_name(name).value_or(-1), azimuth) << name;
}

const Samples few{1, -2, 3, -4};

RecordFile read_component(const std::string& content, const std::string& component) {
  const WrittenFile file("record", content);
  return read_record(file.path(), {{}, {}, {}, component});
}

TEST(Components, AreAddressedByNameAzimuthOrNumber) {
  const std::string content = invented_csmip_volume2(few);
  for (const char* wanted : {"90 Deg", "90 deg", "90", "450", "90deg", "channel 1", "Channel 1: 90 Deg"})
    EXPECT_EQ(read_component(content, wanted).component, "90 Deg") << wanted;
  EXPECT_EQ(read_component(content, "up").component, "Up");
  EXPECT_EQ(read_component(invented_geonet(few), "S74E").component, "S74E");
  EXPECT_EQ(read_component(invented_geonet(few), "106").component, "S74E");
  EXPECT_EQ(read_component(invented_peer(few), "90").component, "90");
}

TEST(Components, AreListedWhenNoneIsNamed) {
  const WrittenFile file("record", invented_csmip_volume2(few));
  try {
    read_record(file.path());
    ADD_FAILURE() << "it was read";
  } catch (const Error& error) {
    EXPECT_EQ(error.where(), file.path().string());
    EXPECT_NE(error.problem().find("\"channel 1: 90 Deg\", \"channel 2: Up\""), std::string::npos) << error.what();
    EXPECT_NE(error.remedy().find("component = "), std::string::npos) << error.what();
  }
}

TEST(Components, AreListedWhenTheNamedOneIsNotThere) {
  for (const char* wanted : {"0", "North", "channel 3", "180 deg", ""}) {
    const WrittenFile file("record", invented_csmip_volume2(few));
    try {
      read_record(file.path(), {{}, {}, {}, wanted});
      ADD_FAILURE() << "read " << wanted;
    } catch (const Error& error) {
      EXPECT_NE(error.problem().find("none of the components"), std::string::npos) << error.what();
      EXPECT_NE(error.remedy().find("\"channel 2: Up\""), std::string::npos) << error.what();
    }
  }
}

TEST(Components, OfOneNameAreToldApartByNumber) {
  const std::string content = with(invented_csmip_volume2(few), "Chan  2: Up  (Sta", "Chan  2: 90 Deg  (Sta");
  EXPECT_EQ(read_component(content, "channel 2").component, "90 Deg");
  EXPECT_THROW(read_component(content, "90"), Error);
}

TEST(Components, OfAPlainTableAreItsColumnsOfAcceleration) {
  const std::string content = "time (s), NS (g), vertical (cm/s2), velocity (m/s)\n0, 0.1, 1, 9\n0.02, -0.2, -2, 9\n";
  const WrittenFile written("record.csv", content);
  const FileOfRecords file = read_record_file(written.path());
  ASSERT_EQ(file.components.size(), 2u);
  EXPECT_EQ(file.components[0].name, "NS");
  EXPECT_EQ(file.components[1].unit, "cm/s2");
  EXPECT_DOUBLE_EQ(file.components[0].record.samples[1], -0.2 * 9.80665);
  EXPECT_DOUBLE_EQ(read_component(content, "vertical").record.samples[1], -0.02);
}

}  // namespace
}  // namespace pilotis
