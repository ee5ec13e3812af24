// Studies that are right, checked field by field. Factors by hand: 1 kN = 1e3 N, 1 cm = 0.01 m, g = 9.80665 m/s2.
#include <gtest/gtest.h>

#include "io/digest.hpp"
#include "tests/io/study/study_fixture.hpp"

namespace pilotis {
namespace {

using test::Folder;
using test::schemes;

Study read(const Folder& folder, const std::string& text) {
  return read_study(folder.write("study.toml", text), schemes);
}

class FullStudy : public testing::Test {
 protected:
  FullStudy() {
    test::write_motions(folder_);
    study_ = read(folder_, test::valid_study);
  }
  Folder folder_;
  Study study_;
};

TEST_F(FullStudy, HeadingAndUnits) {
  EXPECT_EQ(study_.title, "Two kinds of story");
  EXPECT_EQ(study_.file, folder_.path() / "study.toml");
  EXPECT_EQ(study_.text, test::valid_study);
  const StudyUnits& units = study_.units;
  EXPECT_EQ(units.name(Dimension::stiffness), "kN/m");
  EXPECT_EQ(units.name(Dimension::mass), "kN s2/m");
  EXPECT_DOUBLE_EQ(units.factor(Dimension::mass), 1000);  // kN s2/m is the tonne
  EXPECT_DOUBLE_EQ(units.factor(Dimension::moment), 1000);
  EXPECT_DOUBLE_EQ(units.factor(Dimension::acceleration), 1);
}

TEST_F(FullStudy, Stories) {
  const auto& stories = study_.buildings[0].stick.stories;
  ASSERT_EQ(stories.size(), 3u);
  EXPECT_EQ(stories[0].label, "ground story");
  EXPECT_DOUBLE_EQ(stories[0].height, 4.5);
  EXPECT_DOUBLE_EQ(stories[0].mass, 4200e3 / 9.80665);
  EXPECT_EQ(stories[0].dashpot, 0);
  const auto& bilinear = std::get<Bilinear>(stories[0].spring);
  EXPECT_DOUBLE_EQ(bilinear.stiffness, 2.1e8);
  EXPECT_DOUBLE_EQ(bilinear.yield_shear, 2.6e6);
  EXPECT_DOUBLE_EQ(bilinear.post_yield_ratio, 0.03);
  for (int i = 1; i < 3; ++i) {
    EXPECT_EQ(stories[i].label, "");
    EXPECT_DOUBLE_EQ(stories[i].height, 3.5);
    EXPECT_DOUBLE_EQ(stories[i].mass, 400e3);
    EXPECT_DOUBLE_EQ(stories[i].dashpot, 10e3);
    const auto& smooth = std::get<BoucWen>(stories[i].spring);
    EXPECT_DOUBLE_EQ(smooth.stiffness, 1.5e8);
    EXPECT_DOUBLE_EQ(smooth.yield_shear, 2e6);
    EXPECT_EQ(smooth.beta, 0.5);  // the law's own default
  }
}

TEST_F(FullStudy, DampingAndPDelta) {
  const auto& damping = std::get<RayleighByModes>(study_.buildings[0].stick.damping);
  EXPECT_EQ(damping.ratio_first, 0.05);
  EXPECT_EQ(damping.ratio_second, 0.03);
  EXPECT_EQ(damping.first, 1);
  EXPECT_EQ(damping.second, 3);
  EXPECT_TRUE(study_.buildings[0].stick.p_delta);
  EXPECT_EQ(study_.buildings[0].stick.gravity, 9.80665);
}

TEST_F(FullStudy, Motions) {
  ASSERT_EQ(study_.motions.size(), 3u);
  EXPECT_EQ(study_.motions[0].name, "a");  // sorted, though b was written first
  EXPECT_EQ(study_.motions[1].name, "b");
  EXPECT_EQ(study_.motions[2].name, "site");
  const Motion& b = study_.motions[1];
  EXPECT_EQ(b.unit, "g");
  EXPECT_EQ(b.step, 0.01);
  EXPECT_EQ(b.samples, 3);
  EXPECT_DOUBLE_EQ(b.peak.value, -0.2 * 9.80665);
  EXPECT_DOUBLE_EQ(b.peak.time, 0.01);
  EXPECT_DOUBLE_EQ(b.duration(), 0.02);
  const Motion& site = study_.motions[2];
  EXPECT_EQ(site.factor, -1.5);
  EXPECT_DOUBLE_EQ(site.step, 0.005);
  EXPECT_DOUBLE_EQ(site.first_sample_at, 0.005);
  EXPECT_DOUBLE_EQ(site.peak.value, 0.3);  // -20 cm/s2 times -1.5
  const auto samples = study_.motions.samples(2);
  ASSERT_EQ(samples->samples.size(), 3u);
  EXPECT_DOUBLE_EQ(samples->samples[0], -0.15);
  EXPECT_DOUBLE_EQ(samples->samples[1], 0.3);
  EXPECT_EQ(site.digest, digest_of(*samples));
  EXPECT_EQ(site.file, (folder_.path() / "site.txt").string());
  EXPECT_EQ(study_.factors, (std::vector<double>{0.5, 1.0}));
}

TEST_F(FullStudy, ForcesAndInitialState) {
  ASSERT_EQ(study_.forces.size(), 1u);
  EXPECT_EQ(study_.forces[0].floor, 2);
  EXPECT_EQ(study_.forces[0].times, (std::vector<double>{0, 0.5}));
  EXPECT_EQ(study_.forces[0].forces, (std::vector<double>{0, 100e3}));
  EXPECT_EQ(study_.initial_displacement, (std::vector<double>{0.01, 0, -0.002}));
  EXPECT_EQ(study_.initial_velocity, (std::vector<double>{0, 0.1, 0}));
}

TEST_F(FullStudy, MarchAndKeep) {
  EXPECT_EQ(study_.march.scheme.name, "newmark");
  EXPECT_EQ(study_.march.scheme.values, (std::vector<double>{0.1666, 0.5}));
  EXPECT_DOUBLE_EQ(study_.march.step.value(), 0.005);
  EXPECT_EQ(study_.march.tail, 12);
  EXPECT_FALSE(study_.march.duration.has_value());
  EXPECT_FALSE(study_.march.error_check);
  EXPECT_EQ(study_.march.collapse_drift_ratio, 0.08);
  EXPECT_EQ(study_.march.tolerance, 1e-8);
  EXPECT_EQ(study_.march.halvings, 6);
  ASSERT_EQ(study_.keep.histories.size(), 2u);
  EXPECT_EQ(study_.keep.histories[0], find_quantity("drift"));
  EXPECT_EQ(study_.keep.histories[1], find_quantity("base_shear"));
  EXPECT_EQ(study_.keep.every, 4);
}

TEST_F(FullStudy, Limits) {
  ASSERT_EQ(study_.limits.size(), 2u);
  EXPECT_EQ(study_.limits[0].quantity, find_quantity("drift_ratio"));
  EXPECT_EQ(study_.limits[0].statistic, Statistic::percentile);
  EXPECT_EQ(study_.limits[0].percentile, 84);
  EXPECT_EQ(study_.limits[0].value, 0.02);
  EXPECT_EQ(study_.limits[0].source, "project brief, section 4");
  EXPECT_EQ(study_.limits[0].factors, std::vector<double>{1.0});
  EXPECT_EQ(study_.limits[1].statistic, Statistic::max);
  EXPECT_DOUBLE_EQ(study_.limits[1].value, 0.8 * 9.80665);
  EXPECT_TRUE(study_.limits[1].factors.empty());
}

// One story, kips and inches, a pull-back release: nothing but what must be there.
const std::string least_study = R"([units]
force = "kip"
length = "in"
[building]
kind = "stick"
damping = { kind = "none" }
[[story]]
height = 144
weight = 386.0886
spring = { law = "linear", stiffness = 100 }
[initial]
displacement = [1]
[march]
duration = 20
)";

TEST(GoodStudy, LeastAndItsDefaults) {
  const Folder folder;
  const Study study = read(folder, least_study);
  EXPECT_EQ(study.title, "study");  // the file's own name
  const Story& story = study.buildings[0].stick.stories.at(0);
  EXPECT_DOUBLE_EQ(story.height, 144 * 0.0254);
  // 386.0886 in/s2 is standard gravity to seven digits, so this weighs 1 kip s2/in: 4448.222 N / 0.0254 m (NIST SP
  // 811).
  EXPECT_NEAR(story.mass, 4448.222 / 0.0254, 0.05);
  EXPECT_NEAR(std::get<Linear>(story.spring).stiffness, 100 * 175126.8, 100 * 0.05);
  EXPECT_TRUE(std::holds_alternative<NoDamping>(study.buildings[0].stick.damping));
  EXPECT_FALSE(study.buildings[0].stick.p_delta);
  EXPECT_DOUBLE_EQ(study.initial_displacement.at(0), 0.0254);
  EXPECT_TRUE(study.initial_velocity.empty());
  EXPECT_TRUE(study.motions.empty());
  EXPECT_EQ(study.factors, std::vector<double>{1.0});
  EXPECT_EQ(study.march.duration, 20.0);
  EXPECT_FALSE(study.march.step.has_value());
  EXPECT_EQ(study.march.scheme.name, "newmark");
  EXPECT_EQ(study.march.scheme.values, (std::vector<double>{0.25, 0.5}));
  EXPECT_TRUE(study.march.error_check);
  EXPECT_TRUE(study.keep.histories.empty());
  EXPECT_TRUE(study.limits.empty());
  EXPECT_TRUE(study.notes.empty());
}

TEST(GoodStudy, WithoutUnitsIsSiAndSaysSo) {
  const Folder folder;
  std::string text = test::with_line(least_study, "[units]", "");
  text = test::with_line(text, "force", "");
  text = test::with_line(text, "length", "");
  const Study study = read(folder, text);
  EXPECT_DOUBLE_EQ(study.buildings[0].stick.stories[0].height, 144);
  ASSERT_EQ(study.notes.size(), 1u);
  EXPECT_NE(study.notes[0].find("N, m, s"), std::string::npos);
}

TEST(GoodStudy, MassUnitAndGravityOfItsOwn) {
  const Folder folder;
  std::string text = test::with_line(least_study, "length", "length = \"in\"\nmass = \"slug\"");
  const Study by_mass = read(folder, test::with_line(text, "weight", "mass = 2"));
  EXPECT_NEAR(by_mass.buildings[0].stick.stories[0].mass, 2 * 14.59390, 2 * 5e-6);  // slug, NIST SP 811
  text = test::with_line(least_study, "kind", "kind = \"stick\"\ngravity = \"10 m/s2\"");
  EXPECT_NEAR(read(folder, text).buildings[0].stick.stories[0].mass, 386.0886 * 4448.222 / 10, 0.02);
}

TEST(GoodStudy, EveryKindOfDamping) {
  const Folder folder;
  const auto damping = [&](const std::string& value) {
    return read(folder, test::with_line(least_study, "damping", "damping = " + value)).buildings[0].stick.damping;
  };
  EXPECT_EQ(std::get<ModalDamping>(damping("{ kind = \"modal\", ratio = \"5 %\" }")).ratios, std::vector<double>{0.05});
  EXPECT_EQ(std::get<ModalDamping>(damping("{ kind = \"modal\", ratio = [0.02] }")).ratios, std::vector<double>{0.02});
  const auto factors =
      std::get<RayleighByFactors>(damping("{ kind = \"rayleigh\", mass_factor = 0.3, stiffness_factor = \"2 ms\" }"));
  EXPECT_EQ(factors.mass_factor, 0.3);
  EXPECT_DOUBLE_EQ(factors.stiffness_factor, 0.002);
}

TEST(GoodStudy, DampingInATableOfItsOwn) {
  const Folder folder;
  const std::string text =
      test::with_line(least_study, "damping", "[building.damping]\nkind = \"modal\"\nratio = 0.02");
  EXPECT_EQ(std::get<ModalDamping>(read(folder, text).buildings[0].stick.damping).ratios, std::vector<double>{0.02});
}

TEST(GoodStudy, ForceFromAFile) {
  const Folder folder;
  folder.write("push.txt", "# time, force\n0, 0\n\n0.5; 2\n1.0\t-1\n");
  std::string text = test::with_line(least_study, "[initial]", "[[force]]");
  text = test::with_line(text, "displacement", "floor = 1\nfile = \"push.txt\"\nunits = \"tf\"");
  const Study study = read(folder, text);
  ASSERT_EQ(study.forces.size(), 1u);
  EXPECT_EQ(study.forces[0].times, (std::vector<double>{0, 0.5, 1}));
  EXPECT_DOUBLE_EQ(study.forces[0].forces[1], 2 * 9806.65);
}

TEST(GoodStudy, HistoriesAllAndNone) {
  const Folder folder;
  const auto kept = [&](const std::string& value) {
    return read(folder, least_study + "[keep]\nhistories = " + value + "\n").keep.histories.size();
  };
  EXPECT_EQ(kept("\"all\""), quantities().size());
  EXPECT_EQ(kept("\"none\""), 0u);
  EXPECT_EQ(kept("[]"), 0u);
}

TEST(GoodStudy, FormatOfHistories) {
  const Folder folder;
  const auto format = [&](const std::string& keys) {
    return read(folder, least_study + "[keep]\nhistories = \"all\"\n" + keys).keep.format;
  };
  EXPECT_FALSE(format("").single);
  EXPECT_EQ(format("").compression, 4);
  EXPECT_TRUE(format("precision = \"single\"\n").single);
  EXPECT_FALSE(format("precision = \"double\"\n").single);
  EXPECT_EQ(format("compression = 0\n").compression, 0);
  EXPECT_EQ(format("compression = 9\n").compression, 9);
}

// Arithmetic and geometric series; a factor is off by a rounding or two.
TEST(GoodStudy, FactorsAsARange) {
  const Folder folder;
  folder.write("one.txt", "0.1\n0.2\n");
  const auto factors = [&](const std::string& value, const std::string& more = "") {
    return read(folder, least_study + "[suite]\nunits = \"g\"\nstep = 0.01\nmotions = [\"one.txt\"]\nfactors = " +
                            value + "\n" + more)
        .factors;
  };
  const std::vector<double> linear = factors("{ from = 0.1, to = 2.0, count = 20 }");
  ASSERT_EQ(linear.size(), 20u);
  EXPECT_EQ(linear.front(), 0.1);
  EXPECT_EQ(linear.back(), 2.0);
  for (int i = 0; i < 20; ++i) EXPECT_NEAR(linear[i], 0.1 * (i + 1), 4e-16 * (i + 1)) << i;
  EXPECT_EQ(factors("{ from = 1, to = 3, count = 3, spacing = \"linear\" }"), (std::vector<double>{1, 2, 3}));
  const std::vector<double> log = factors("{ from = 0.1, to = 1.6, count = 5, spacing = \"log\" }");
  ASSERT_EQ(log.size(), 5u);
  EXPECT_EQ(log.front(), 0.1);
  EXPECT_EQ(log.back(), 1.6);
  for (int i = 0; i < 5; ++i) EXPECT_NEAR(log[i], 0.1 * (1 << i), 1e-15 * (1 << i)) << i;
  EXPECT_EQ(factors("{ from = 0.5, to = 2, count = 2 }"), (std::vector<double>{0.5, 2}));
  // A limit may name one of them as a person would write it.
  const std::string limit =
      "[[limit]]\nquantity = \"drift_ratio\"\nstatistic = \"max\"\nvalue = 0.02\nsource = \"x\"\nfactors = [0.3]\n";
  EXPECT_NO_THROW(factors("{ from = 0.1, to = 2.0, count = 20 }", limit));
}

TEST(GoodStudy, NamesOfMotionsAreMadeUniqueByTheirExtension) {
  const Folder folder;
  folder.write("one.ew", "0.1\n0.2\n");
  folder.write("one.ns", "0.1\n0.2\n");
  folder.write("[odd].txt", "0.1\n0.2\n");
  const Study study = read(folder, least_study +
                                       "[suite]\nunits = \"g\"\nstep = 0.01\nmotions = [\"one.*\", \"[odd].txt\", "
                                       "{ file = \"one.ns\", name = \"again\", factor = 2 }]\n");
  ASSERT_EQ(study.motions.size(), 4u);
  EXPECT_EQ(study.motions[0].name, "one.ew");
  EXPECT_EQ(study.motions[1].name, "one.ns");
  EXPECT_EQ(study.motions[2].name, "[odd]");
  EXPECT_EQ(study.motions[3].name, "again");
}

TEST(GoodStudy, NotesOfTheRecordReadersNameTheFile) {
  const Folder folder;
  folder.write("one.txt", "0.1\n0.2\n");
  const Study study = read(folder, least_study + "[suite]\nunits = \"g\"\nstep = 0.01\nmotions = [\"one.txt\"]\n");
  ASSERT_FALSE(study.notes.empty());
  EXPECT_NE(study.notes[0].find("one.txt"), std::string::npos);
}

TEST(GoodStudy, EveryLawWithItsParameters) {
  const Folder folder;
  for (const Method& method : law_catalogue()) {
    std::string spring = "spring = { law = \"" + std::string(method.name) + "\"";
    for (const Parameter& parameter : method.parameters)
      if (!parameter.otherwise)
        spring += ", " + std::string(parameter.key) + " = " +
                  (parameter.dimension == Dimension::none ? "0.5"
                   : parameter.key == "cracking_shear"    ? "10"
                                                          : "100");
    const Study study = read(folder, test::with_line(least_study, "spring", spring + " }"));
    EXPECT_EQ(law_name(study.buildings[0].stick.stories[0].spring), method.name);
  }
}

}  // namespace
}  // namespace pilotis
