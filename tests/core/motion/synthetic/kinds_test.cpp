// What every kind of made motion must do, over the catalogue.
#include <gtest/gtest.h>

#include <cmath>

#include "core/error.hpp"
#include "core/motion/synthetic/baseline.hpp"
#include "core/motion/synthetic/intensity.hpp"
#include "tests/core/motion/synthetic/made.hpp"

namespace pilotis {
namespace {

class EveryKind : public testing::TestWithParam<std::size_t> {
 protected:
  const SyntheticKind& kind() const { return synthetic_catalogue()[GetParam()]; }
  Accelerogram motion(std::uint64_t seed) const { return made(kind().method.name, {}, {seed, 0.01, 20}).record; }
};

TEST_P(EveryKind, IsAValidRecordOfTheAskedLength) {
  const Accelerogram record = motion(7);
  EXPECT_NO_THROW(validate(record, "made"));
  EXPECT_EQ(record.samples.size(), 2001u);
  EXPECT_GT(std::abs(peak_of(record).value), 0);
  for (double sample : record.samples) ASSERT_EQ(sample, std::round(sample * 1e6) / 1e6);
}

TEST_P(EveryKind, SameSeedSameMotionOtherSeedOtherMotion) {
  EXPECT_EQ(motion(7).samples, motion(7).samples);
  if (kind().random) {
    EXPECT_NE(motion(7).samples, motion(8).samples);
  } else {
    EXPECT_EQ(motion(7).samples, motion(8).samples);
  }
}

// Samples are rounded to 1e-6 m/s2, at most 0.5e-6 each: N dt 0.5e-6 in velocity, T times that in displacement.
TEST_P(EveryKind, RandomGroundIsAtRestAtTheEnd) {
  for (std::uint64_t seed = 1; kind().random && seed <= 20; ++seed) {
    const Accelerogram record = motion(seed);
    EXPECT_LE(std::abs(ground_velocity(record.samples, record.step).back()), 2001 * 0.01 * 0.5e-6);
    EXPECT_LE(std::abs(ground_displacement(record.samples, record.step).back()), 20.01 * 2001 * 0.01 * 0.5e-6);
  }
}

// A value outside, for each end that a parameter has: refused by the parameter's name, with its range in the message.
TEST_P(EveryKind, RefusesEachParameterOutOfRange) {
  for (std::size_t i = 0; i < kind().method.parameters.size(); ++i) {
    const Parameter& parameter = kind().method.parameters[i];
    const double last = static_cast<double>(parameter.choices.size());
    for (double wrong : {parameter.choices.empty() ? parameter.least - 1 : -1.0,
                         parameter.choices.empty() ? parameter.most + 1 : last, double(NAN)}) {
      if (std::isinf(wrong)) continue;
      std::vector<double> values = usual_values(kind());
      values[i] = wrong;
      try {
        make_synthetic(kind().method.name, values, usual_curves(kind()), {1, 0.01, 20}, "here");
        ADD_FAILURE() << parameter.key << " is not checked";
      } catch (const Error& e) {
        EXPECT_EQ(e.where(), "here." + std::string(parameter.key));
        const std::string range = std::isnan(wrong) ? "finite" : allowed_range(parameter);
        EXPECT_NE(e.remedy().find(range), std::string::npos) << e.what();
      }
    }
  }
}

TEST_P(EveryKind, EveryNumberHasARange) {
  for (const Parameter& parameter : kind().method.parameters)
    EXPECT_FALSE(allowed_range(parameter).empty()) << parameter.key;
}

TEST_P(EveryKind, RefusesWrongTables) {
  for (std::size_t i = 0; i < kind().curves.size(); ++i)
    for (const Curve& wrong : {Curve{{1}, {1}}, Curve{{1, 1}, {1, 1}}, Curve{{1, 2}, {1, -1}}, Curve{{1, 2}, {1}},
                               Curve{{0, 2}, {1, 1}}, Curve{{1, NAN}, {1, 1}}}) {
      std::vector<Curve> curves = usual_curves(kind());
      curves[i] = wrong;
      try {
        make_synthetic(kind().method.name, usual_values(kind()), curves, {1, 0.01, 20}, "here");
        ADD_FAILURE() << kind().curves[i].key << " is not checked";
      } catch (const Error& e) {
        EXPECT_EQ(e.where(), "here." + std::string(kind().curves[i].key));
      }
    }
}

TEST_P(EveryKind, RefusesAnImpossibleGrid) {
  for (const SyntheticGrid& grid : {SyntheticGrid{1, 0, 20},
                                    {1, -0.01, 20},
                                    {1, NAN, 20},
                                    {1, 0.01, 0},
                                    {1, 0.01, 20.005},
                                    {1, 0.01, INFINITY},
                                    {1, 1e-9, 1e6}})
    EXPECT_THROW(made(kind().method.name, {}, grid), Error) << grid.step << " " << grid.duration;
}

INSTANTIATE_TEST_SUITE_P(Synthetic, EveryKind, testing::Range<std::size_t>(0, synthetic_catalogue().size()),
                         [](const auto& info) { return std::string(synthetic_catalogue()[info.param].method.name); });

TEST(Synthetic, UnknownNameIsAnErrorThatListsTheKnownOnes) {
  try {
    make_synthetic("earthquake", {}, {}, {}, "here");
    FAIL();
  } catch (const Error& e) {
    EXPECT_NE(std::string(e.what()).find("\"earthquake\""), std::string::npos);
    for (const SyntheticKind& kind : synthetic_catalogue())
      EXPECT_NE(e.remedy().find(kind.method.name), std::string::npos);
  }
}

class EveryNoise : public testing::TestWithParam<const char*> {};

// Samples are rounded to 1e-6 m/s2.
TEST_P(EveryNoise, HasTheIntensityAskedFor) {
  EXPECT_NEAR(std::abs(peak_of(made(GetParam(), {{"pga", 2.5}}).record).value), 2.5, 0.5e-6);
  EXPECT_NEAR(arias_intensity_of(made(GetParam(), {{"arias", 1.5}}).record), 1.5, 1e-5);
  const Accelerogram one = made(GetParam(), {{"noise_density", 1}}).record;
  const Accelerogram four = made(GetParam(), {{"noise_density", 4}}).record;
  for (std::size_t i = 0; i < one.samples.size(); ++i) ASSERT_NEAR(four.samples[i], 2 * one.samples[i], 2e-6);
}

TEST_P(EveryNoise, WantsExactlyOneIntensity) {
  EXPECT_THROW(made(GetParam(), {{"pga", 0}}), Error);
  EXPECT_THROW(made(GetParam(), {{"pga", 1}, {"arias", 1}}), Error);
}

INSTANTIATE_TEST_SUITE_P(Synthetic, EveryNoise, testing::Values("kanai_tajimi", "clough_penzien", "white_noise"),
                         [](const auto& info) { return std::string(info.param); });

// Arias 1970: pi / (2 g) integral of a^2; of a constant A over T and its fall to zero within one step, A^2 (T + dt /
// 3).
TEST(Arias, OfAConstant) {
  const Accelerogram record{0.1, 0, std::vector<double>(101, 2.0)};
  EXPECT_NEAR(arias_intensity_of(record), std::acos(-1.0) / (2 * 9.80665) * 4 * (10 + 0.1 / 3), 1e-12);
}

}  // namespace
}  // namespace pilotis
