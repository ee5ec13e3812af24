// Motions made for a target spectrum, their response computed anew here; and the response they are made with.
#include "core/motion/synthetic/spectrum_compatible.hpp"

#include <gtest/gtest.h>

#include <Eigen/Dense>
#include <cmath>
#include <numbers>
#include <unsupported/Eigen/MatrixFunctions>

#include "core/error.hpp"
#include "core/motion/synthetic/curve.hpp"
#include "tests/core/motion/synthetic/estimate.hpp"
#include "tests/core/motion/synthetic/made.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;

// An invented target: rises to 0.15 s, flat to 0.5 s, then as 1/T.
const Curve target{{0.05, 0.15, 0.5, 3}, {4, 7, 7, 7 * 0.5 / 3}};

// omega^2 max |u| of an oscillator under linear acceleration between samples, by the matrix exponential of
// (u, u', a, a') over parts of a step no longer than a fortieth of the period.
double pseudo_acceleration(const Accelerogram& record, double period, double damping) {
  const double omega = 2 * pi / period;
  const int parts = static_cast<int>(std::ceil(40 * record.step / period));
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

MadeMotion motion_for(std::uint64_t seed, const std::map<std::string, double>& given = {}) {
  const std::vector<Curve> curves{target};
  return make_synthetic("spectrum_compatible", usual_values(kind_named("spectrum_compatible"), given), curves,
                        {seed, 0.01, 20.48}, "here");
}

class SpectrumCompatible : public testing::TestWithParam<std::uint64_t> {};

// Within the tolerance at the periods of its grid. An extreme between the steps, forty to the period, is missed by
// 1 - cos(pi / 40) = 0.31 % where the response is one harmonic; here up to as much less or more of it.
TEST_P(SpectrumCompatible, IsWithinTheTolerance) {
  const Accelerogram record = motion_for(GetParam()).record;
  for (double period : target_grid(0.05, 3)) {
    const double reached = pseudo_acceleration(record, period, 0.05) / log_log(target, period);
    EXPECT_GT(reached, 0.85 * std::cos(pi / 40)) << period;
    EXPECT_LT(reached, 1.15 / std::cos(pi / 40)) << period;
  }
}

INSTANTIATE_TEST_SUITE_P(Seeds, SpectrumCompatible, testing::Range<std::uint64_t>(1, 6));

TEST(SpectrumCompatible, FollowsItsParameters) {
  const Accelerogram usual = motion_for(1).record;
  const Accelerogram damped = motion_for(1, {{"damping", 0.1}}).record;
  EXPECT_NE(usual.samples, damped.samples);
  for (double period : {0.2, 0.5, 1.0, 2.0})
    EXPECT_NEAR(pseudo_acceleration(damped, period, 0.1) / log_log(target, period), 1, 1.15 / std::cos(pi / 40) - 1)
        << period;
}

TEST(SpectrumCompatible, SaysWhenTheToleranceIsNotReached) {
  try {
    motion_for(1, {{"tolerance", 0.001}, {"iterations", 3}, {"draws", 2}});
    FAIL();
  } catch (const Error& e) {
    EXPECT_EQ(e.where(), "here.tolerance");
    EXPECT_NE(e.problem().find("2 sets of phases and 3 iterations"), std::string::npos) << e.what();
  }
}

TEST(SpectrumCompatible, RefusesAGridThatDoesNotFit) {
  const std::vector<Curve> curves{target};
  const auto make = [&](const SyntheticGrid& grid) {
    return make_synthetic("spectrum_compatible", usual_values(kind_named("spectrum_compatible")), curves, grid, "here");
  };
  EXPECT_THROW(make({1, 0.02, 20}), Error);
  EXPECT_THROW(make({1, 0.01, 2.5}), Error);
}

// The density is where the iteration starts: for a flat target of 5 % the stationary variance of an oscillator under
// it, omega G pi / (4 zeta) of its own plus what lies below, times the squared peak factor, gives the target back. Here
// through its definition at the lowest frequency, where nothing lies below (s so long that zeta_s = zeta).
TEST(SpectrumCompatible, DensityStartsAsVanmarckeHasIt) {
  const Curve flat{{0.1, 10}, {3, 3}};
  const double omega = 2 * pi / 5, zeta = 0.05, s = 1e4;
  const double n = omega * s / (2 * pi * std::log(2.0)), delta = std::sqrt(4 * zeta / pi);
  const double r2 = 2 * std::log(2 * n * (1 - std::exp(-std::pow(delta, 1.2) * std::sqrt(pi * std::log(2 * n)))));
  EXPECT_NEAR(density_of_target(flat, zeta, s, {omega, omega + 0.01})[0], 9 / r2 / (omega * (pi / (4 * zeta) - 1)),
              1e-12);
}

}  // namespace
}  // namespace pilotis
