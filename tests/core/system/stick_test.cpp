// A stick as matrices. PUBLISHED I (common practice, no source): for two stories K = [[k1+k2, -k2], [-k2, k2]], C of
// the same shape from the dashpots. P-Delta: -P/h in each story (Clough & Penzien, linear geometric stiffness; from
// memory).
#include <gtest/gtest.h>

#include "core/error.hpp"
#include "core/system/assemble_stick.hpp"
#include "core/system/kernel.hpp"
#include "core/system/modes.hpp"
#include "tests/core/system/sticks.hpp"

namespace pilotis {
namespace {

using namespace test;

void expect_matrix(const Eigen::MatrixXd& found, const Eigen::MatrixXd& expected) {
  ASSERT_EQ(found.rows(), expected.rows());
  EXPECT_LE((found - expected).cwiseAbs().maxCoeff(), 1e-14 * expected.cwiseAbs().maxCoeff()) << found;
}

TEST(TwoStories, StiffnessAndDamping) {
  Stick stick;
  stick.stories = {linear_story(3e4, 5e7, 4.0, 7e4), linear_story(2e4, 3e7, 3.0, 2e4)};
  const System system = assemble(stick);
  expect_matrix(dense(system.stiffness), Eigen::Matrix2d{{8e7, -3e7}, {-3e7, 3e7}});
  expect_matrix(dense(system.damping), Eigen::Matrix2d{{9e4, -2e4}, {-2e4, 2e4}});
  EXPECT_EQ(system.mass, (std::vector{3e4, 2e4}));
  EXPECT_EQ(system.influence, (std::vector{1.0, 1.0}));
  EXPECT_TRUE(system.is_linear());
}

TEST(TwoStories, BilinearSpringsStandInTheInitialStiffnessOnly) {
  Stick stick = linear_stick({3e4, 2e4}, {5e7, 3e7});
  stick.stories[1].spring = Bilinear{3e7, 1e5, 0.1};
  const System system = assemble(stick);
  expect_matrix(dense(system.stiffness), Eigen::Matrix2d{{5e7, 0}, {0, 0}});
  expect_matrix(dense(initial_stiffness(system)), Eigen::Matrix2d{{8e7, -3e7}, {-3e7, 3e7}});
  EXPECT_EQ(system.nonlinear_elements, 1);
}

// By hand: weights 0.3 MN and 0.2 MN at g = 10; P/h = 0.5/4 and 0.2/3 MN/m.
TEST(TwoStories, PDeltaTakesWeightsAboveOverHeight) {
  Stick stick;
  stick.stories = {linear_story(3e4, 5e7, 4.0), linear_story(2e4, 3e7, 3.0)};
  stick.p_delta = true;
  stick.gravity = 10;
  const double k1 = 5e7 - 5e5 / 4, k2 = 3e7 - 2e5 / 3;
  expect_matrix(dense(assemble(stick).stiffness), Eigen::Matrix2d{{k1 + k2, -k2}, {-k2, k2}});
}

TEST(OneStory, IsDiagonal) {
  const System system = assemble(linear_stick({1e4}, {4e6}));
  EXPECT_EQ(system.half, 0);
  EXPECT_EQ(system.stiffness.at(0, 0), 4e6);
}

// Internal forces are C v + K u + sum B^T f, on random sticks; the expected ones from dense matrices and drifts by
// hand.
TEST(RandomSticks, InternalForcesAndTangentBand) {
  std::mt19937 dice(5);
  std::uniform_real_distribution<double> move(-0.05, 0.05);
  for (int n = 1; n <= 12; ++n) {
    const Stick stick = random_stick(n, dice);
    const System system = assemble(stick);
    State<double> state = state_at_rest<double>(system);
    for (double& u : state.u) u = move(dice);
    for (double& v : state.v) v = move(dice);
    Forces<double> forces(system);
    std::vector<double> band(system.stiffness.entries.size());
    Memories<double> trial = state.memory;
    internal_forces(system, state.u.data(), state.v.data(), state.memory, trial, forces);
    steady_band(system, 3.0, 5.0, band.data());
    add_tangents(system, 5.0, forces.tangent.data(), band.data());
    Eigen::VectorXd expected = dense(system.damping) * Eigen::Map<Eigen::VectorXd>(state.v.data(), n);
    Eigen::MatrixXd stiffness = Eigen::MatrixXd::Zero(n, n);
    for (int i = 0; i < n; ++i) {
      const double drift = state.u[i] - (i > 0 ? state.u[i - 1] : 0.0);
      const double k0 = initial_stiffness(stick.stories[i].spring);
      const auto* bilinear = std::get_if<Bilinear>(&stick.stories[i].spring);
      // The virgin bilinear spring by hand: its skeleton.
      const double yields = bilinear ? bilinear->yield_shear / k0 : 1e9;
      const bool beyond = std::abs(drift) > yields;
      const double k = beyond ? bilinear->post_yield_ratio * k0 : k0;
      const double force = beyond ? std::copysign(k0 * yields + k * (std::abs(drift) - yields), drift) : k0 * drift;
      expected[i] += force;
      stiffness(i, i) += k;
      if (i == 0) continue;
      expected[i - 1] -= force;
      stiffness(i - 1, i - 1) += k;
      stiffness(i, i - 1) -= k;
      stiffness(i - 1, i) -= k;
    }
    const double largest_force = 2e8 * 0.1;
    for (int i = 0; i < n; ++i) EXPECT_NEAR(forces.internal[i], expected[i], 1e-14 * largest_force);
    Band effective(n, system.half);
    effective.entries = band;
    Eigen::MatrixXd whole = 3.0 * dense(system.damping) + 5.0 * stiffness;
    for (int i = 0; i < n; ++i) whole(i, i) += system.mass[i];
    expect_matrix(dense(effective), whole);
  }
}

}  // namespace
}  // namespace pilotis
