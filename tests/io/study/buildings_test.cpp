// Studies of several buildings, each in a file of its own.
#include <fmt/format.h>
#include <gtest/gtest.h>

#include "core/error.hpp"
#include "io/study/building_file.hpp"
#include "tests/io/study/study_fixture.hpp"

namespace pilotis {
namespace {

using test::Folder;
using test::line_starting;
using test::with_line;

// Two floors, in tonnes-force and centimeters.
const std::string low_house = R"(title = "Low house"
[units]
force = "tf"
length = "cm"
[building]
kind = "stick"
damping = { kind = "none" }
[[story]]
repeat = 2
height = 300
weight = 100
spring = { law = "linear", stiffness = 10 }
)";

// Three floors, in SI because it says nothing.
const std::string tower = R"([building]
kind = "stick"
damping = { kind = "modal", ratio = 0.05 }
p_delta = true
[[story]]
repeat = 3
height = 3
mass = 1e5
spring = { law = "linear", stiffness = 1e8 }
)";

const std::string study_of_two = R"(title = "Batch"
buildings = ["low.toml", "towers/*.toml"]
[units]
force = "kN"
length = "m"
[initial]
[[force]]
floor = 2
table = [[0, 0], [1, 1]]
[[limit]]
quantity = "drift_ratio"
statistic = "max"
value = 0.02
source = "brief"
)";

class Batch : public testing::Test {
 protected:
  Batch() {
    folder_.write("low.toml", low_house);
    folder_.write("towers/b.toml", tower);
    folder_.write("towers/a.toml", tower);
  }
  std::string path(const std::string& name) const { return (folder_.path() / name).string(); }
  Study read(const std::string& text) const { return read_study(folder_.write("study.toml", text), test::schemes); }

  Error error_of(const std::string& text) const {
    try {
      read(text);
    } catch (const Error& error) {
      EXPECT_EQ(error.kind(), ErrorKind::input);
      return error;
    }
    ADD_FAILURE() << "accepted:\n" << text;
    return input_error("", "", "");
  }
  // Where, what and how each hold a piece.
  void expect(const std::string& text, const std::string& where, const std::string& found,
              const std::string& allowed) const {
    const Error error = error_of(text);
    EXPECT_EQ(error.where(), where) << error.what();
    EXPECT_NE(error.problem().find(found), std::string::npos) << error.what();
    EXPECT_NE(error.remedy().find(allowed), std::string::npos) << error.what();
  }

  Folder folder_;
  const std::string two_ = with_line(study_of_two, "[initial]", "");
};

TEST_F(Batch, BuildingsInTheOrderOfTheStudyAndOfTheirNames) {
  const Study study = read(two_);
  ASSERT_EQ(study.buildings.size(), 3u);
  EXPECT_EQ(study.buildings[0].name, "low");
  EXPECT_EQ(study.buildings[1].name, "a");  // sorted, though b was written first
  EXPECT_EQ(study.buildings[2].name, "b");
  EXPECT_EQ(study.buildings[0].title, "Low house");
  EXPECT_EQ(study.buildings[1].title, "a");
  EXPECT_EQ(study.buildings[2].file, folder_.path() / "towers/b.toml");
  EXPECT_EQ(study.text, two_);
  EXPECT_EQ(study.buildings[0].text, low_house);
  EXPECT_EQ(study.buildings[2].text, tower);
  EXPECT_EQ(study.title, "Batch");
  EXPECT_EQ(study.limits.size(), 1u);
}

// 1 tf = 9806.65 N by definition of standard gravity (NIST SP 811).
TEST_F(Batch, EachBuildingInItsOwnUnits) {
  const Study study = read(two_);
  const Stick& low = study.buildings[0].stick;
  ASSERT_EQ(low.stories.size(), 2u);
  EXPECT_DOUBLE_EQ(low.stories[1].height, 3.0);
  EXPECT_DOUBLE_EQ(low.stories[1].mass, 100e3);
  EXPECT_DOUBLE_EQ(std::get<Linear>(low.stories[1].spring).stiffness, 10 * 9806.65 / 0.01);
  EXPECT_EQ(study.buildings[0].units.length, "cm");
  const Stick& tower = study.buildings[1].stick;
  ASSERT_EQ(tower.stories.size(), 3u);
  EXPECT_EQ(tower.stories[0].height, 3.0);
  EXPECT_TRUE(tower.p_delta);
  EXPECT_EQ(study.units.force, "kN");                                   // the study's stay its own
  EXPECT_EQ(study.forces.at(0).forces, (std::vector<double>{0, 1e3}));  // kN
  ASSERT_EQ(study.notes.size(), 2u);
  EXPECT_EQ(study.notes[0].find(path("towers/a.toml") + ": no [units]"), 0u) << study.notes[0];
}

TEST_F(Batch, NamesAsGivenAndMadeUnique) {
  folder_.write("low.bld", low_house);
  const Study study =
      read(with_line(two_, "buildings", "buildings = [\"low.*\", { file = \"low.toml\", name = \"B\" }]"));
  ASSERT_EQ(study.buildings.size(), 3u);
  EXPECT_EQ(study.buildings[0].name, "low.bld");
  EXPECT_EQ(study.buildings[1].name, "low.toml");
  EXPECT_EQ(study.buildings[2].name, "B");
}

TEST_F(Batch, TheListItself) {
  const std::string at = path("study.toml") + ":2: buildings";
  const auto listed = [&](const std::string& value) { return with_line(two_, "buildings", "buildings = " + value); };
  expect(listed("[]"), at, "empty list", "at least one");
  expect(listed("\"low.toml\""), at, "the text", "a list in square brackets");
  expect(listed("[3]"), at + "[1]", "the number 3", "a path, a pattern or a table");
  expect(listed("[\"low.toml\", \"none/*.toml\"]"), at + "[2]", "no file matches \"none/*.toml\"", "relative to");
  expect(listed("[\"none.toml\"]"), at + "[1]", "no file \"none.toml\"", "relative to");
  expect(listed("[\"low.toml\", \"low.toml\"]"), at + "[2]", "a second building is called \"low.toml\"",
         "list it once");
  expect(listed("[{ file = \"towers/*.toml\", name = \"x\" }]"), at + "[1].name", "one name for 2 files", "one file");
  expect(listed("[{ flie = \"low.toml\" }]"), at + "[1].flie", "unknown key", "did you mean \"file\"?");
  expect(listed("[{ name = \"x\" }]"), at + "[1].file", "missing", "name the building file");
}

TEST_F(Batch, NotBesideABuildingOfItsOwn) {
  const std::string building = "[building]\nkind = \"stick\"\n";
  expect(two_ + building, fmt::format("{}:{}: building", path("study.toml"), line_starting(two_ + building, "[build")),
         "lists building files", "one or the other");
  const std::string story = "[[story]]\nheight = 3\n";
  expect(two_ + story, fmt::format("{}:{}: story", path("study.toml"), line_starting(two_ + story, "[[story")),
         "lists building files", "one or the other");
}

TEST_F(Batch, WhatIsWrongInABuildingFileNamesThatFileAndItsLine) {
  const auto file = [&](const std::string& start, const std::string& changed) {
    folder_.write("low.toml", with_line(low_house, start, changed));
    return path("low.toml");
  };
  expect(two_, file("height", "hieght = 3") + ":10: story[1].hieght", "unknown key", "did you mean \"height\"?");
  expect(two_, file("title", "titel = \"x\"") + ":1: titel", "unknown key", "allowed: title, units, building, story");
  expect(two_, file("force", "force = \"kg\"") + ":3: units.force", "\"kg\"", "such as N, kN");
  expect(two_, file("height", "height = -1") + ":10: story[1].height", "found -1 cm", "greater than 0 m");
  expect(two_, file("kind", "") + ":5: building.kind", "missing", "stick");
  EXPECT_EQ(error_of((file("[units]", "[units"), two_)).where(), path("low.toml") + ":2");  // no TOML
  folder_.write("low.toml", "title = \"x\"\n");
  expect(two_, path("low.toml") + ":1: building", "missing", "[building] table");
}

TEST_F(Batch, AWholeStudyIsNoBuildingFile) {
  for (const char* section : {"[suite]\nmotions = []", "[[force]]\nfloor = 1", "[initial]", "[march]", "[keep]",
                              "[[limit]]", "[buildings]"}) {
    folder_.write("low.toml", low_house + section + "\n");
    const Error error = error_of(two_);
    EXPECT_EQ(error.where().find(path("low.toml") + ":13: "), 0u) << error.what();
    EXPECT_NE(error.problem().find("a whole study"), std::string::npos) << error.what();
    EXPECT_NE(error.remedy().find("title, [units], [building] and [[story]]"), std::string::npos) << error.what();
    EXPECT_FALSE(is_building_file(path("low.toml"))) << section;
  }
  EXPECT_TRUE(is_building_file(path("towers/a.toml")));
  EXPECT_FALSE(is_building_file(folder_.write("study.toml", two_)));
}

TEST_F(Batch, EveryBuildingHasTheFloorsThatAreLoaded) {
  const std::string at = fmt::format("{}:{}: force[1].floor", path("study.toml"), line_starting(two_, "floor"));
  const std::string third = with_line(two_, "floor", "floor = 3");
  expect(third, at, fmt::format("building \"low\" ({}) has 2 floor(s)", path("low.toml")), "every building has");
  expect(with_line(two_, "floor", "floor = 4"), at, "found 4", "at most 3");
  const std::string towers_only = with_line(third, "buildings", "buildings = [\"towers/*.toml\"]");
  EXPECT_EQ(read(towers_only).forces.at(0).floor, 3);

  const std::string initial = "[initial]\nvelocity = [0, 0, 1]\n";
  expect(two_ + initial,
         fmt::format("{}:{}: initial.velocity", path("study.toml"), line_starting(two_ + initial, "vel")),
         fmt::format("found 3 value(s), and building \"low\" ({}) has 2 floor(s)", path("low.toml")), "each floor");
  EXPECT_EQ(read(towers_only + initial).initial_velocity, (std::vector<double>{0, 0, 1}));
}

TEST_F(Batch, AStudyWithItsOwnBuildingHasOne) {
  const std::string own = "title = \"Alone\"\n" + tower + "[initial]\nvelocity = [0, 0, 1]\n[march]\nduration = 5\n";
  const Study study = read(own);
  ASSERT_EQ(study.buildings.size(), 1u);
  EXPECT_EQ(study.buildings[0].name, "Alone");
  EXPECT_TRUE(study.buildings[0].file.empty());
  EXPECT_TRUE(study.buildings[0].text.empty());
  const Study untitled = read(with_line(own, "title", ""));
  EXPECT_EQ(untitled.buildings.at(0).name, "building");
}

TEST_F(Batch, ABuildingFileAlone) {
  std::vector<std::string> notes;
  const StudyBuilding building = read_building_file(folder_.path() / "towers/a.toml", notes);
  EXPECT_EQ(building.name, "a");
  EXPECT_EQ(building.stick.stories.size(), 3u);
  EXPECT_EQ(notes.size(), 1u);
  EXPECT_THROW(read_building_file(folder_.path() / "none.toml", notes), Error);
}

}  // namespace
}  // namespace pilotis
