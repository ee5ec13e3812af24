// Periods, shapes and effective masses against published values and closed forms, and against Eigen's general solver.
#include "core/system/modes.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"
#include "core/system/assemble_stick.hpp"
#include "tests/core/system/sticks.hpp"

namespace pilotis {
namespace {

using namespace test;
using std::numbers::pi;

constexpr double inch = 0.0254, pound_force = 4.4482216152605;  // SI, exact by definition
constexpr double kip = 1000 * pound_force, kip_per_inch = kip / inch;

// PUBLISHED F: Chopra, ch. 12-13 (from memory; recomputed). m = 100 kip/g, k = 31.54 kip/in chosen for T1 = 2 s.
std::vector<Mode> five_equal_stories() {
  const double m = 100 * kip / standard_gravity, k = 31.54 * kip_per_inch;
  return modes_of(assemble(linear_stick(std::vector(5, m), std::vector(5, k), 12 * 12 * inch)));
}

TEST(FiveEqualStories, PeriodsArePublished) {
  const double printed[] = {2.000, 0.6852, 0.4346, 0.3383, 0.2966};
  const std::vector<Mode> modes = five_equal_stories();
  // k and g are printed to four digits, which moves all periods together by up to 5e-4; the first is nominally 2 s. The
  // others are therefore taken relative to it, to half a unit of their last digit.
  EXPECT_NEAR(modes[0].period, 2.000, 2.000 * 5e-4);
  for (int j = 1; j < 5; ++j) EXPECT_NEAR(modes[j].period / modes[0].period * 2.0, printed[j], 0.5e-4) << j;
}

TEST(FiveEqualStories, EffectiveMassesArePublished) {
  const double printed[] = {4.398, 0.436, 0.121, 0.0375, 0.0078};
  const double half_digit[] = {0.5e-3, 0.5e-3, 0.5e-3, 0.5e-4, 0.5e-4};
  const std::vector<Mode> modes = five_equal_stories();
  const double m = 100 * kip / standard_gravity;
  for (int j = 0; j < 5; ++j) EXPECT_NEAR(modes[j].effective_mass / m, printed[j], half_digit[j]) << j;
}

// PUBLISHED G: Clough & Penzien, MDOF free-vibration example (from memory; recomputed). Top down 1.0, 1.5, 2.0 kip
// s2/in.
TEST(ThreeStories, FrequenciesAndShapeArePublished) {
  const double unit = kip_per_inch;  // 1 kip s2/in in kg
  const std::vector<Mode> modes =
      modes_of(assemble(linear_stick({2.0 * unit, 1.5 * unit, 1.0 * unit}, {1800 * unit, 1200 * unit, 600 * unit})));
  const double printed[] = {14.52, 31.05, 46.10};
  for (int j = 0; j < 3; ++j) EXPECT_NEAR(2 * pi / modes[j].period, printed[j], 0.005) << j;
  EXPECT_NEAR(modes[0].shape[2], 1.0, 1e-14);
  EXPECT_NEAR(modes[0].shape[1], 0.649, 0.0005);
  EXPECT_NEAR(modes[0].shape[0], 0.302, 0.0005);
}

// PUBLISHED H: omega_j = 2 sqrt(k/m) sin((2j-1) pi / (2(2n+1))); the shape of floor i is sin((2j-1) pi i / (2n+1)) up
// to scale (the same closed form). A symmetric eigenvalue is off by at most a few n eps |K/M| = 4 n eps k/m absolutely.
TEST(EqualStories, ClosedFormForOneToThirtyStories) {
  const double m = 2.5e4, k = 4e7;
  for (int n = 1; n <= 30; ++n) {
    const std::vector<Mode> modes = modes_of(assemble(linear_stick(std::vector(n, m), std::vector(n, k))));
    ASSERT_EQ(int(modes.size()), n);
    for (int j = 1; j <= n; ++j) {
      const double angle = (2 * j - 1) * pi / (2.0 * (2 * n + 1));
      const double expected = 4 * k / m * std::sin(angle) * std::sin(angle);
      const double omega = 2 * pi / modes[j - 1].period;
      EXPECT_NEAR(omega * omega, expected, 40 * n * 2.3e-16 * k / m) << n << " " << j;
      // First-order perturbation of shapes: error of K/M over the smallest gap, which falls with n^-2.
      const double roof = std::sin(2 * angle * n);
      for (int i = 1; i <= n; ++i)
        EXPECT_NEAR(modes[j - 1].shape[i - 1] / modes[j - 1].shape[n - 1], std::sin(2 * angle * i) / roof,
                    40.0 * n * n * n * 2.3e-16 / std::abs(roof));
    }
  }
}

Eigen::MatrixXd shape_matrix(const std::vector<Mode>& modes) {
  const int n = static_cast<int>(modes.size());
  Eigen::MatrixXd shapes(n, n);
  for (int j = 0; j < n; ++j) shapes.col(j) = Eigen::Map<const Eigen::VectorXd>(modes[j].shape.data(), n);
  return shapes;
}

// Outside reference: Eigen 3.4's solver of the general problem (Cholesky of M), with P-Delta every other time.
TEST(RandomSticks, AgreeWithEigensGeneralSolver) {
  std::mt19937 dice(11);
  for (int n = 1; n <= 20; ++n) {
    Stick stick = random_stick(n, dice);
    stick.p_delta = n % 2 == 0;
    const System system = assemble(stick);
    const std::vector<Mode> modes = modes_of(system);
    const Eigen::MatrixXd mass = Eigen::Map<const Eigen::VectorXd>(system.mass.data(), n).asDiagonal();
    const Eigen::MatrixXd stiffness = dense(initial_stiffness(system));
    const Eigen::GeneralizedSelfAdjointEigenSolver<Eigen::MatrixXd> other(stiffness, mass);
    const double largest = other.eigenvalues().maxCoeff();
    const double tolerance =
        40 * n * 2.3e-16 * 10;  // and up to 10 for the condition of M, whose entries differ so much
    for (int j = 0; j < n; ++j) {
      const double omega = 2 * pi / modes[j].period;
      EXPECT_NEAR(omega * omega, other.eigenvalues()[j], tolerance * largest);
    }
    // Shapes: orthogonal through M and through K, each scaled by its own size.
    const Eigen::MatrixXd shapes = shape_matrix(modes);
    const Eigen::MatrixXd m = shapes.transpose() * mass * shapes, k = shapes.transpose() * stiffness * shapes;
    for (int i = 0; i < n; ++i)
      for (int j = 0; j < n; ++j) {
        if (i == j) continue;
        EXPECT_LE(std::abs(m(i, j)), tolerance * std::sqrt(m(i, i) * m(j, j)));
        EXPECT_LE(std::abs(k(i, j)), tolerance * largest * std::sqrt(m(i, i) * m(j, j)));
      }
  }
}

// By definition (Chopra, ch. 13): effective masses sum to the total mass, participation times shape sums to iota.
TEST(RandomSticks, EffectiveMassesSumToTheTotalMass) {
  std::mt19937 dice(12);
  for (int n = 1; n <= 20; ++n) {
    const System system = assemble(random_stick(n, dice));
    const std::vector<Mode> modes = modes_of(system);
    double total = 0, effective = 0;
    for (const double m : system.mass) total += m;
    Eigen::VectorXd influence = Eigen::VectorXd::Zero(n);
    for (const Mode& mode : modes) {
      effective += mode.effective_mass;
      influence += mode.participation * Eigen::Map<const Eigen::VectorXd>(mode.shape.data(), n);
    }
    EXPECT_NEAR(effective, total, 1e-12 * total);
    for (int i = 0; i < n; ++i) EXPECT_NEAR(influence[i], 1.0, 1e-11);
  }
}

TEST(Shapes, LargestIsOneAndTheRoofIsPositive) {
  std::mt19937 dice(13);
  for (int n = 1; n <= 10; ++n)
    for (const Mode& mode : modes_of(assemble(random_stick(n, dice)))) {
      double largest = 0;
      for (const double x : mode.shape) largest = std::max(largest, std::abs(x));
      EXPECT_NEAR(largest, 1.0, 1e-15);
      EXPECT_GE(mode.shape.back(), 0.0);
    }
}

// PUBLISHED K: a story of stiffness k under P has k - P/h and buckles at P = k h.
TEST(PDelta, SoftensAStoryByPOverH) {
  const double m = 1e5, h = 4, g = 9.81, k = 2e6;
  Stick stick = linear_stick({m}, {k}, h);
  stick.p_delta = true;
  stick.gravity = g;
  const double omega = std::sqrt((k - m * g / h) / m);
  EXPECT_NEAR(modes_of(assemble(stick))[0].period, 2 * pi / omega, 1e-14 * 2 * pi / omega * 4);
}

TEST(PDelta, BucklesAtPEqualsKTimesH) {
  const double m = 1e5, h = 4, g = 9.81, critical = m * g / h;
  for (const double share : {0.5, 0.999999, 1.000001}) {
    Stick stick = linear_stick({m}, {share * critical}, h);
    stick.p_delta = true;
    stick.gravity = g;
    const System system = assemble(stick);
    if (share > 1) {
      EXPECT_NO_THROW(modes_of(system));
      continue;
    }
    try {
      modes_of(system);
      FAIL() << "a story of " << share << " times its critical stiffness stood";
    } catch (const Error& e) {
      EXPECT_EQ(e.kind(), ErrorKind::input);
      EXPECT_NE(e.problem().find("buckles"), std::string::npos) << e.what();
    }
  }
}

TEST(PDelta, WithoutItTheSameStoryStands) { EXPECT_NO_THROW(modes_of(assemble(linear_stick({1e5}, {1e5}, 4)))); }

}  // namespace
}  // namespace pilotis
