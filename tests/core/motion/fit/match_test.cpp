// Matching by wavelets: the target reached, at a response computed anew here, and the ground still at rest at the end.
#include "core/motion/fit/match.hpp"

#include <gtest/gtest.h>

#include <Eigen/Dense>
#include <cmath>
#include <numbers>
#include <unsupported/Eigen/MatrixFunctions>

#include "core/error.hpp"
#include "core/motion/spectra/response_spectrum.hpp"
#include "core/motion/synthetic/baseline.hpp"
#include "tests/core/motion/synthetic/made.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;

// omega^2 max |u| by the matrix exponential of (u, u', a, a') over parts of a step, a hundredth of the period at most.
double pseudo_acceleration(const Accelerogram& record, double period, double damping) {
  const double omega = 2 * pi / period;
  const int parts = static_cast<int>(std::ceil(100 * record.step / period));
  Eigen::Matrix4d a;
  a << 0, 1, 0, 0, -omega * omega, -2 * damping * omega, -1, 0, 0, 0, 0, 1, 0, 0, 0, 0;
  const Eigen::Matrix4d march = (a * (record.step / parts)).eval().exp();
  Eigen::Vector4d state = Eigen::Vector4d::Zero();
  double largest = 0;
  for (std::size_t i = 0; i + 1 < record.samples.size(); ++i) {
    state[2] = record.samples[i];
    state[3] = (record.samples[i + 1] - record.samples[i]) / record.step;
    for (int k = 0; k < parts; ++k) {
      state = march * state;
      largest = std::max(largest, std::abs(state[0]));
    }
  }
  return omega * omega * largest;
}

// An invented target: flat to 0.5 s, then as 1/T; lower for more damping.
MatchTarget target_of(double damping, double level) {
  MatchTarget target{damping, period_grid(0.1, 3, 30, "here"), {}};
  for (double period : target.periods) target.pseudo_accelerations.push_back(level * std::min(1.0, 0.5 / period));
  return target;
}

double largest_of(const std::vector<double>& values) {
  double largest = 0;
  for (double value : values) largest = std::max(largest, std::abs(value));
  return largest;
}

Accelerogram start_record(std::uint64_t seed) {
  return made("clough_penzien", {{"pga", 2.8}}, {seed, 0.01, 30}).record;
}

class Matching : public testing::TestWithParam<std::uint64_t> {};

// Forty steps to a period miss an extreme by 1 - cos(pi / 40) = 0.31 % of a wave of that period (oscillator.hpp); that
// comes on top of the tolerance, upward only.
TEST_P(Matching, ReachesItsTargetAtEveryMatchedPeriod) {
  const std::vector<MatchTarget> targets{target_of(0.05, 7)};
  const Match match = matched(start_record(GetParam()), targets, {0.05, 30}, "here");
  EXPECT_TRUE(match.within_tolerance) << match.deviation;
  for (std::size_t i = 0; i < targets[0].periods.size(); ++i) {
    const double reached =
        pseudo_acceleration(match.record, targets[0].periods[i], 0.05) / targets[0].pseudo_accelerations[i];
    EXPECT_GT(reached, 0.95 - 1e-6) << targets[0].periods[i];
    EXPECT_LT(reached, 1.05 / std::cos(pi / 40)) << targets[0].periods[i];
  }
}

// The record ends at rest to the rounding of its samples (1e-6 m/s2 over 30 s: 15e-6 m/s, 0.5e-3 m at most); wavelets
// add nothing but rounding of doubles.
TEST_P(Matching, LeavesTheGroundAtRest) {
  const std::vector<MatchTarget> targets{target_of(0.05, 7)};
  const Match match = matched(start_record(GetParam()), targets, {0.05, 30}, "here");
  const auto velocity = ground_velocity(match.record.samples, 0.01);
  const auto displacement = ground_displacement(match.record.samples, 0.01);
  EXPECT_LT(std::abs(velocity.back()), 15e-6 + 1e-9);
  EXPECT_LT(std::abs(displacement.back()), 0.5e-3 + 1e-9);
  EXPECT_LT(std::abs(displacement.back()), 0.01 * largest_of(displacement));
}

INSTANTIATE_TEST_SUITE_P(Seeds, Matching, testing::Values(1, 2, 3, 4));

TEST(Match, TwoDampingsAtOnce) {
  const std::vector<MatchTarget> targets{target_of(0.05, 7), target_of(0.15, 7 * std::sqrt(0.5))};
  const Match match = matched(start_record(2), targets, {0.12, 60}, "here");
  EXPECT_TRUE(match.within_tolerance) << match.deviation;
}

// The improved tapered cosine itself: largest at its center, which lies a quarter of a damped period or a little less
// before the peak of the response; at rest after the record even where the record cuts it off.
TEST(MatchWavelet, EndsAtRestWhereverItStands) {
  const Accelerogram record{0.01, 0, std::vector<double>(3001, 0.0)};
  for (double period : {0.1, 0.5, 3.0})
    for (double peak : {0.4 * period, 10.0, 29.9}) {
      const auto wavelet = match_wavelet(record, period, 0.05, peak);
      EXPECT_NEAR(ground_velocity(wavelet, 0.01).back(), 0, 1e-10);
      EXPECT_NEAR(ground_displacement(wavelet, 0.01).back(), 0, 1e-9);
    }
}

// Away from the ends what is taken out is small: velocity of the plain wavelet over all time is
// gamma sqrt(pi) exp(-(omega' gamma / 2)^2), below 2e-5 s for 0.1 to 3 s, so the samples are those of the formula.
TEST(MatchWavelet, IsTheTaperedCosine) {
  const Accelerogram record{0.01, 0, std::vector<double>(6001, 0.0)};
  const double zeta = 0.05, root = std::sqrt(1 - zeta * zeta);
  for (double period : {0.2, 1.0}) {
    const auto wavelet = match_wavelet(record, period, zeta, 30);
    const double damped = 2 * pi / period * root, gamma = 1.178 * std::pow(1 / period, -0.93);
    const double center = 30 - std::atan(root / zeta) / damped;
    for (std::size_t i = 2500; i < 3500; ++i) {
      const double s = 0.01 * static_cast<double>(i) - center;
      ASSERT_NEAR(wavelet[i], std::cos(damped * s) * std::exp(-(s / gamma) * (s / gamma)), 1e-4);
    }
  }
}

TEST(Match, SaysHowFarItCame) {
  const std::vector<MatchTarget> targets{target_of(0.05, 7)};
  const Match match = matched(start_record(1), targets, {1e-9, 2}, "here");
  EXPECT_FALSE(match.within_tolerance);
  EXPECT_EQ(match.iterations, 2);
  double worst = 0;
  const double damping = 0.05;
  const auto spectrum = response_spectrum(ground_of(match.record), targets[0].periods, {&damping, 1}, "here");
  const std::vector<double>& reached = spectrum.curves[0].pseudo_acceleration;
  for (std::size_t i = 0; i < reached.size(); ++i)
    worst = std::max(worst, std::abs(reached[i] / targets[0].pseudo_accelerations[i] - 1));
  EXPECT_EQ(match.deviation, worst);  // the very kernel that every spectrum is made with
}

TEST(Match, RefusesWhatCannotBeMatched) {
  const Accelerogram record = start_record(1);
  const auto refused = [&](const MatchTarget& target, const MatchSettings& settings = {}) {
    const std::vector<MatchTarget> targets{target};
    EXPECT_THROW(matched(record, targets, settings, "here"), Error);
  };
  refused({0.05, {}, {}});
  refused({0.05, {1, 2}, {1}});
  refused({0.05, {2, 1}, {1, 1}});
  refused({0.05, {0.01}, {1}});
  refused({0.05, {31}, {1}});
  refused({0.05, {1}, {-1}});
  refused({0, {1}, {1}});
  refused({0.05, {1}, {1}}, {0, 30});
  refused({0.05, {1}, {1}}, {0.05, 0});
}

}  // namespace
}  // namespace pilotis
