// `pilotis check` and `pilotis modes` on a study of several buildings and on a building file, as a shell sees them.
#include <gtest/gtest.h>
#include <sys/wait.h>
#include <unistd.h>

#include <array>
#include <cmath>
#include <cstdio>
#include <filesystem>
#include <fstream>
#include <nlohmann/json.hpp>
#include <numbers>

namespace pilotis {
namespace {

namespace fs = std::filesystem;
using Json = nlohmann::json;

struct Ran {
  int status = -1;
  std::string output;  // standard output and standard error together
};

bool has(const std::string& text, const std::string& part) { return text.find(part) != std::string::npos; }

// Equal stories of 3 m, 1000 kg a floor and 1e6 N/m, in SI.
std::string equal_stories(int count, const std::string& more = "") {
  return "[units]\nforce = \"N\"\nlength = \"m\"\n[building]\nkind = \"stick\"\ndamping = { kind = \"none\" }\n" +
         more + "[[story]]\nrepeat = " + std::to_string(count) +
         "\nheight = 3\nmass = 1000\nspring = { law = \"linear\", stiffness = 1e6 }\n";
}

// s; closed form of a uniform chain fixed at its foot: omega_j = 2 sqrt(k/m) sin((2 j - 1) pi / (2 (2 n + 1))), as in
// textbooks on vibration (from memory; for n = 1 it is sqrt(k/m)).
double period(int stories, int mode) {
  const double half_angle = (2 * mode - 1) * std::numbers::pi / (2 * (2 * stories + 1));
  return 2 * std::numbers::pi / (2 * std::sqrt(1e6 / 1000) * std::sin(half_angle));
}

class Check : public testing::Test {
 protected:
  Check() {
    std::string pattern = (fs::temp_directory_path() / "pilotis-check-XXXXXX").string();
    if (mkdtemp(pattern.data()) == nullptr) throw std::runtime_error("no temporary folder");
    folder_ = pattern;
    fs::create_directory(folder_ / "towers");
    write("low.toml", "title = \"Low house\"\n" + equal_stories(1));
    write("towers/ten.toml", equal_stories(10));
    write("towers/two.toml", equal_stories(2));
    write("pulse.txt", "# units: g\n# step: 0.01 s\n# first sample at: 0 s\n0.1\n0.2\n0.1\n");
    write("batch.toml",
          "title = \"Batch\"\nbuildings = [{ file = \"low.toml\", name = \"L\" }, \"towers/*.toml\"]\n"
          "[units]\nforce = \"kN\"\nlength = \"m\"\n[suite]\n"
          "motions = [\"pulse.txt\", { file = \"pulse.txt\", name = \"other\" }]\n"
          "factors = { from = 0.5, to = 2, count = 4 }\n"
          "[keep]\nhistories = \"all\"\nprecision = \"single\"\ncompression = 7\n");
  }
  ~Check() override {
    std::error_code ignored;
    fs::remove_all(folder_, ignored);
  }
  void write(const std::string& name, const std::string& content) const { std::ofstream(folder_ / name) << content; }

  Ran run(const std::string& arguments) const {
    const std::string command = "cd " + folder_.string() + " && " + PILOTIS_PROGRAM + " " + arguments + " 2>&1";
    Ran ran;
    FILE* pipe = ::popen(command.c_str(), "r");
    std::array<char, 4096> buffer;
    for (std::size_t n; (n = std::fread(buffer.data(), 1, buffer.size(), pipe)) > 0;)
      ran.output.append(buffer.data(), n);
    ran.status = WEXITSTATUS(::pclose(pipe));
    return ran;
  }

  fs::path folder_;
};

TEST_F(Check, TellsOfEveryBuildingAndCountsTheRuns) {
  const Ran ran = run("check --json batch.toml");
  ASSERT_EQ(ran.status, 0) << ran.output;
  const Json study = Json::parse(ran.output).at(0);
  EXPECT_EQ(study.at("kind"), "study");
  EXPECT_EQ(study.at("runs"), 3 * 2 * 4);
  EXPECT_EQ(study.at("factors"), (std::vector<double>{0.5, 1, 1.5, 2}));
  EXPECT_EQ(study.at("keep").at("precision"), "single");
  EXPECT_EQ(study.at("keep").at("compression"), 7);
  const Json& buildings = study.at("buildings");
  ASSERT_EQ(buildings.size(), 3u);
  const std::array<const char*, 3> names{"L", "ten", "two"};
  const std::array<int, 3> stories{1, 10, 2};
  for (int b = 0; b < 3; ++b) {
    EXPECT_EQ(buildings[b].at("name"), names[b]);
    EXPECT_EQ(buildings[b].at("stories").size(), static_cast<std::size_t>(stories[b]));
    EXPECT_DOUBLE_EQ(buildings[b].at("height_m"), 3.0 * stories[b]);
    EXPECT_NEAR(buildings[b].at("weight_N"), 9806.65 * stories[b], 1e-6);
    const Json& periods = buildings[b].at("first_periods_s");
    ASSERT_EQ(periods.size(), static_cast<std::size_t>(std::min(3, stories[b])));
    for (std::size_t j = 0; j < periods.size(); ++j)
      EXPECT_NEAR(periods[j], period(stories[b], static_cast<int>(j) + 1), 1e-9) << names[b];
  }
}

TEST_F(Check, AsText) {
  const Ran ran = run("check batch.toml");
  ASSERT_EQ(ran.status, 0) << ran.output;
  EXPECT_TRUE(has(ran.output, "buildings: 3")) << ran.output;
  EXPECT_TRUE(has(ran.output, "towers/ten.toml")) << ran.output;
  EXPECT_TRUE(has(ran.output, "weight (kN)")) << ran.output;  // the study's unit, though the file is in N
  EXPECT_TRUE(has(ran.output, "98.0665")) << ran.output;      // of ten floors, kN
  EXPECT_TRUE(has(ran.output, "runs: 24 (buildings 3 x motions 2 x factors 4)")) << ran.output;
  EXPECT_TRUE(has(ran.output, "single precision, compression 7")) << ran.output;
}

TEST_F(Check, ABuildingFile) {
  const Ran ran = run("check low.toml");
  EXPECT_EQ(ran.status, 0) << ran.output;
  EXPECT_TRUE(has(ran.output, "low.toml: building \"Low house\"")) << ran.output;
  EXPECT_TRUE(has(ran.output, "first periods: 0.1987 s")) << ran.output;  // 2 pi sqrt(m/k) = 0.198692 s
  const Json building = Json::parse(run("check --json low.toml").output).at(0);
  EXPECT_EQ(building.at("kind"), "building");
  EXPECT_EQ(building.at("building").at("name"), "low");
  EXPECT_EQ(building.at("building").at("stories").size(), 1u);
}

TEST_F(Check, WhatIsWrongInABuildingFile) {
  write("towers/two.toml", equal_stories(2, "pdelta = true\n"));
  for (const char* file : {"batch.toml", "towers/two.toml"}) {
    const Ran ran = run(std::string("check ") + file);
    EXPECT_EQ(ran.status, 2);
    EXPECT_TRUE(has(ran.output, "towers/two.toml:7: building.pdelta")) << ran.output;
  }
  // 1e6 N/m against P/h = 1000 kg of 1e7 m/s2 over 3 m.
  write("towers/two.toml", equal_stories(2, "p_delta = true\ngravity = 1e7\n"));
  const Ran buckled = run("check batch.toml");
  EXPECT_EQ(buckled.status, 2);
  EXPECT_TRUE(has(buckled.output, "building \"two\" (towers/two.toml)")) << buckled.output;
  EXPECT_TRUE(has(buckled.output, "buckles")) << buckled.output;
}

TEST_F(Check, ModesOfOneBuildingOfSeveral) {
  const Ran which = run("modes batch.toml");
  EXPECT_EQ(which.status, 2);
  EXPECT_TRUE(has(which.output, "has 3 buildings; name one with --building: L, ten, two")) << which.output;
  const Ran none = run("modes batch.toml --building tn");
  EXPECT_EQ(none.status, 2);
  EXPECT_TRUE(has(none.output, "no building \"tn\"; did you mean \"ten\"? its buildings: L, ten, two")) << none.output;
  const Ran ten = run("modes batch.toml --building ten --json");
  ASSERT_EQ(ten.status, 0) << ten.output;
  const Json modes = Json::parse(ten.output).at("modes");
  ASSERT_EQ(modes.size(), 10u);
  EXPECT_NEAR(modes[9].at("period_s"), period(10, 10), 1e-9);
}

TEST_F(Check, ModesOfABuildingFile) {
  const Json json = Json::parse(run("modes towers/two.toml --json").output);
  EXPECT_EQ(json.at("building"), "two");
  EXPECT_NEAR(json.at("modes").at(0).at("period_s"), period(2, 1), 1e-9);
  EXPECT_EQ(run("modes none.toml").status, 2);
}

}  // namespace
}  // namespace pilotis
