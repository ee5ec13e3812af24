// What a study asks to be done to its records: in order, told line by line, and nothing else. Values by hand.
#include <gtest/gtest.h>

#include <cmath>

#include "core/error.hpp"
#include "io/study/motion_store.hpp"
#include "tests/io/study/study_fixture.hpp"

namespace pilotis {
namespace {

using test::Folder;

class ProcessedMotion : public testing::Test {
 protected:
  ProcessedMotion() {
    folder_.write("east.txt", "1\n3\n1\n3\n");
    folder_.write("north.txt", "0\n2\n-2\n4\n");
  }
  MotionSource source(const char* file) const { return {folder_.path() / file, "made up", 1, {"m/s2", 0.01, 0.0}}; }
  Folder folder_;
};

TEST_F(ProcessedMotion, StepsAreDoneInOrderAndTold) {
  MotionSource asked = source("east.txt");
  asked.process = {make_process_step("remove_mean", {}, "here")};
  const MotionRead plain = read_motion(source("east.txt")), done = read_motion(asked);
  EXPECT_EQ(plain.record.samples, (std::vector<double>{1, 3, 1, 3}));
  EXPECT_EQ(done.record.samples, (std::vector<double>{-1, 1, -1, 1}));
  EXPECT_TRUE(plain.motion.processing.empty());
  ASSERT_EQ(done.motion.processing.size(), 1u);
  EXPECT_NE(done.motion.processing[0].find("remove_mean"), std::string::npos) << done.motion.processing[0];
  EXPECT_NE(done.motion.digest, plain.motion.digest) << "the digest is of what is used";
}

TEST_F(ProcessedMotion, FactorComesAfterTheSteps) {
  MotionSource asked = source("east.txt");
  asked.factor = -2;
  asked.process = {make_process_step("remove_mean", {}, "here")};
  EXPECT_EQ(read_motion(asked).record.samples, (std::vector<double>{2, -2, 2, -2}));
}

TEST_F(ProcessedMotion, TwoComponentsAreTurnedIntoOne) {
  for (double angle : {0.0, std::acos(-1.0) / 2, std::acos(-1.0) / 4}) {
    MotionSource asked = source("east.txt");
    asked.pair = PairedComponent{folder_.path() / "north.txt", {"m/s2", 0.01, 0.0}, angle};
    const MotionRead turned = read_motion(asked);
    const std::vector<double> east{1, 3, 1, 3}, north{0, 2, -2, 4};
    for (std::size_t i = 0; i < east.size(); ++i)
      EXPECT_NEAR(turned.record.samples[i], std::cos(angle) * east[i] + std::sin(angle) * north[i], 1e-15);
    ASSERT_EQ(turned.motion.processing.size(), 1u);
  }
}

std::string study_text(const std::string& motions) {
  return "title = \"t\"\n[building]\nkind = \"stick\"\ndamping = { kind = \"none\" }\n[[story]]\nheight = 3\nmass = "
         "1e5\n"
         "spring = { law = \"linear\", stiffness = 1e7 }\n[suite]\nunits = \"m/s2\"\nstep = 0.01\n" +
         motions;
}

TEST_F(ProcessedMotion, AStudySaysIt) {
  const auto file = folder_.write("study.toml", study_text(R"(
process = [{ step = "remove_mean" }]
motions = ["east.txt", { file = "north.txt", process = [] },
           { files = ["east.txt", "north.txt"], angle = "90 degree", name = "turned" }]
)"));
  const Study study = read_study(file, test::schemes);
  ASSERT_EQ(study.motions.size(), 3u);
  EXPECT_EQ(study.motions.samples(0)->samples, (std::vector<double>{-1, 1, -1, 1}));
  EXPECT_EQ(study.motions.samples(1)->samples, (std::vector<double>{0, 2, -2, 4}));
  for (int i = 0; i < 4; ++i)  // 90 degrees: the second component less its mean, 1
    EXPECT_NEAR(study.motions.samples(2)->samples[i], study.motions.samples(1)->samples[i] - 1, 1e-15);
  EXPECT_EQ(study.motions[2].processing.size(), 3u) << "the mean of both, and the turn";
}

std::string refusal(const Folder& folder, const std::string& motions) {
  const auto file = folder.write("bad.toml", study_text(motions));
  try {
    read_study(file, test::schemes);
  } catch (const Error& error) {
    return error.what();
  }
  return "accepted";
}

TEST_F(ProcessedMotion, RefusalsNameTheKey) {
  const std::string no_angle = refusal(folder_, "motions = [{ files = [\"east.txt\", \"north.txt\"] }]\n");
  EXPECT_NE(no_angle.find("no angle"), std::string::npos) << no_angle;
  const std::string three = refusal(folder_, "motions = [{ files = [\"east.txt\"], angle = 0 }]\n");
  EXPECT_NE(three.find("a pair"), std::string::npos) << three;
  const std::string unknown = refusal(folder_, "process = [{ step = \"remove_men\" }]\nmotions = [\"east.txt\"]\n");
  EXPECT_NE(unknown.find("remove_mean"), std::string::npos) << unknown;
}

}  // namespace
}  // namespace pilotis
