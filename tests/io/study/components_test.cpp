// Motions of a study that are one component of a file of several. All records are invented.
#include <gtest/gtest.h>

#include "core/error.hpp"
#include "tests/io/study/study_fixture.hpp"
#include "tests/support/invented_records.hpp"

namespace pilotis {
namespace {

const std::string head =
    "[building]\nkind = \"stick\"\ndamping = { kind = \"none\" }\n[units]\nforce = \"kN\"\nlength = \"m\"\n[[story]]\n"
    "height = 3\nmass = 1\nspring = { law = \"linear\", stiffness = 100 }\n";

Study study_with(const std::string& motions) {
  const test::Folder folder;
  folder.write("three.V2A", invented_geonet({1, -2, 3, -4}));
  return read_study(folder.write("study.toml", head + "[suite]\nmotions = [" + motions + "]\n"), test::schemes);
}

TEST(StudyComponents, AreChosenByTheKeyComponent) {
  const Study study = study_with(
      "{ file = \"three.V2A\", component = \"S74E\" }, { file = \"three.*\", component = \"196\", factor = 2 }, "
      "{ file = \"three.V2A\", component = \"up\", name = \"vertical\" }");
  ASSERT_EQ(study.motions.size(), 3u);
  EXPECT_EQ(study.motions[0].name, "three.V2A S74E");
  EXPECT_EQ(study.motions[1].name, "three.V2A 196");
  EXPECT_EQ(study.motions[2].name, "vertical");
  EXPECT_DOUBLE_EQ(study.motions.samples(0)->samples[3], -0.004);
  EXPECT_DOUBLE_EQ(study.motions.samples(1)->samples[3], -0.008);
}

void expect_refused(const std::string& motions, const std::vector<std::string>& said) {
  try {
    study_with(motions);
    ADD_FAILURE() << motions << " was accepted";
  } catch (const Error& error) {
    EXPECT_EQ(error.kind(), ErrorKind::input);
    for (const std::string& text : said)
      EXPECT_NE(std::string(error.what()).find(text), std::string::npos) << text << ": " << error.what();
  }
}

TEST(StudyComponents, MustBeNamedWhereAFileHoldsSeveral) {
  expect_refused("\"three.V2A\"", {"three.V2A", "3 components", "\"S16W\", \"S74E\", \"Up\"", "component = \"S16W\""});
  expect_refused("{ file = \"three.V2A\", component = \"N\" }", {"three.V2A", "\"N\"", "\"S16W\", \"S74E\", \"Up\""});
}

TEST(StudyComponents, TwoAtOnceNeedAnAngle) {
  expect_refused("{ files = [\"a\", \"b\"] }", {"study.toml", "files", "no angle"});
  expect_refused("{ file = \"three.V2A\", components = [\"S16W\", \"S74E\"] }", {"components", "no angle"});
  expect_refused("{ file = \"three.V2A\", component = [\"S16W\", \"S74E\"] }", {"suite.motions[1].component", "text"});
}

}  // namespace
}  // namespace pilotis
