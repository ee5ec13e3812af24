// Damping matrices by their definition: Rayleigh zeta = a0/(2 omega) + a1 omega/2, modal damping the asked ratio in
// each mode (Chopra, Dynamics of Structures, ch. 11; from memory).
#include <gtest/gtest.h>

#include <numbers>

#include "core/error.hpp"
#include "core/system/assemble_stick.hpp"
#include "core/system/effective_solve.hpp"
#include "core/system/modes.hpp"
#include "tests/core/system/sticks.hpp"

namespace pilotis {
namespace {

using namespace test;

// Rounding of phi^T C phi, of the modes, and of up to n terms: far below anything a ratio is asked to.
constexpr double tight = 1e-11;

Stick without_dashpots(int stories, std::mt19937& dice) {
  Stick stick = random_stick(stories, dice);
  for (Story& story : stick.stories) story.dashpot = 0;
  return stick;
}

Eigen::MatrixXd mass_matrix(const System& system) {
  return Eigen::Map<const Eigen::VectorXd>(system.mass.data(), system.freedoms).asDiagonal();
}

TEST(RayleighDamping, GivesTheAskedRatiosInBothModes) {
  std::mt19937 dice(21);
  for (int n = 2; n <= 12; ++n) {
    Stick stick = without_dashpots(n, dice);
    const int second = 2 + static_cast<int>(dice() % (n - 1));
    stick.damping = RayleighByModes{0.02, 0.05, 1, second};
    const std::vector<Mode> modes = modes_of(assemble(stick));
    EXPECT_NEAR(modes[0].damping_ratio, 0.02, tight);
    EXPECT_NEAR(modes[second - 1].damping_ratio, 0.05, tight);
  }
}

TEST(RayleighDamping, IsMassPlusElasticStiffnessEvenWithPDelta) {
  std::mt19937 dice(22);
  for (int n = 2; n <= 8; ++n) {
    Stick stick = without_dashpots(n, dice);
    const Eigen::MatrixXd elastic = dense(initial_stiffness(assemble(stick)));
    stick.p_delta = true;
    stick.damping = RayleighByFactors{0.3, 0.002};
    const System system = assemble(stick);
    const Eigen::MatrixXd expected = 0.3 * mass_matrix(system) + 0.002 * elastic;
    EXPECT_LE((dense_damping(system) - expected).cwiseAbs().maxCoeff(), 1e-14 * expected.cwiseAbs().maxCoeff());
    // By modes: the ratios are those of the building without P-Delta, so C is the same with and without.
    stick.damping = RayleighByModes{0.05, 0.05, 1, 2};
    const Eigen::MatrixXd with = dense_damping(assemble(stick));
    stick.p_delta = false;
    EXPECT_EQ(with, dense_damping(assemble(stick)));
  }
}

TEST(RayleighDamping, AddsToTheDashpots) {
  std::mt19937 dice(23);
  Stick stick = random_stick(4, dice);
  const Eigen::MatrixXd dashpots = dense_damping(assemble(stick));
  stick.damping = RayleighByFactors{0.5, 0.0};
  const System system = assemble(stick);
  const Eigen::MatrixXd expected = dashpots + 0.5 * mass_matrix(system);
  EXPECT_LE((dense_damping(system) - expected).cwiseAbs().maxCoeff(), 1e-14 * expected.maxCoeff());
}

TEST(RayleighDamping, AModeTheBuildingLacksIsAnError) {
  Stick stick = linear_stick({1e4, 1e4}, {1e7, 1e7});
  for (const RayleighByModes modes :
       {RayleighByModes{0.05, 0.05, 1, 3}, RayleighByModes{0.05, 0.05, 2, 2}, RayleighByModes{0.05, 0.05, 0, 1}}) {
    stick.damping = modes;
    EXPECT_THROW(assemble(stick), Error) << modes.first << " " << modes.second;
  }
}

TEST(ModalDampingMatrix, OneRatioGoesToEveryMode) {
  std::mt19937 dice(24);
  for (int n = 1; n <= 12; ++n) {
    Stick stick = without_dashpots(n, dice);
    stick.p_delta = n % 2 == 0;
    stick.damping = ModalDamping{{0.05}};
    const System system = assemble(stick);
    for (const Mode& mode : modes_of(system)) EXPECT_NEAR(mode.damping_ratio, 0.05, tight);
    // No mode damps another: Phi^T C Phi is diagonal.
    const ModalBasis basis = modal_basis(initial_stiffness(system), system.mass);
    const Eigen::MatrixXd modal = basis.shapes.transpose() * dense_damping(system) * basis.shapes;
    const Eigen::MatrixXd off = modal - Eigen::MatrixXd(modal.diagonal().asDiagonal());
    EXPECT_LE(off.cwiseAbs().maxCoeff(), tight * modal.diagonal().maxCoeff());
  }
}

TEST(ModalDampingMatrix, AListLeavesTheRestUndamped) {
  std::mt19937 dice(25);
  Stick stick = without_dashpots(6, dice);
  stick.damping = ModalDamping{{0.02, 0.03, 0.10}};
  const std::vector<Mode> modes = modes_of(assemble(stick));
  const double asked[] = {0.02, 0.03, 0.10, 0, 0, 0};
  for (int j = 0; j < 6; ++j) EXPECT_NEAR(modes[j].damping_ratio, asked[j], tight) << j;
}

TEST(ModalDampingMatrix, ForceIsTheFullMatrixTimesVelocity) {
  std::mt19937 dice(26);
  for (int n = 1; n <= 10; ++n) {
    Stick stick = random_stick(n, dice);
    stick.damping = ModalDamping{{0.05}};
    const System system = assemble(stick);
    std::vector<double> v(n), force(n, 0.0);
    for (double& x : v) x = static_cast<double>(dice() % 1000) / 500 - 1;
    add_damping_forces(system, v.data(), force.data());
    const Eigen::VectorXd expected = dense_damping(system) * Eigen::Map<Eigen::VectorXd>(v.data(), n);
    for (int i = 0; i < n; ++i) EXPECT_NEAR(force[i], expected[i], 1e-13 * dense_damping(system).norm());
  }
}

// (M + c_c C + c_k K_t) x = b against a dense solve with the full C, tangents drawn at random. Each solve errs by
// about n eps times the condition (Higham, from memory); the low-rank correction passes through the band part, whose
// condition therefore counts as well.
double condition(const Eigen::MatrixXd& a) {
  const Eigen::VectorXd values = a.selfadjointView<Eigen::Lower>().eigenvalues();
  return values.cwiseAbs().maxCoeff() / values.cwiseAbs().minCoeff();
}

Eigen::MatrixXd tangent_stiffness(const System& system, const std::vector<double>& tangent) {
  Band band = system.stiffness;
  add_tangents(system, 1.0, tangent.data(), band.entries.data());
  return dense(band);
}

TEST(EffectiveSolve, AgreesWithADenseSolve) {
  std::mt19937 dice(27);
  std::uniform_real_distribution<double> share(-0.02, 1), entry(-1e5, 1e5);
  for (int n = 1; n <= 16; ++n)
    for (const Damping& damping :
         {Damping{NoDamping{}}, Damping{ModalDamping{{0.05}}}, Damping{ModalDamping{{0.3, 0.02}}}}) {
      Stick stick = random_stick(n, dice);
      stick.damping = damping;
      if (n < 2 && std::holds_alternative<ModalDamping>(damping)) stick.damping = ModalDamping{{0.3}};
      const System system = assemble(stick);
      std::vector<double> tangent(system.elements), x(n);
      for (double& k : tangent) k = share(dice) * 1e8;
      for (double& value : x) value = entry(dice);
      const Eigen::VectorXd b = Eigen::Map<Eigen::VectorXd>(x.data(), n);
      const double dt = 0.01, c_c = dt / 2, c_k = dt * dt / 4;  // average acceleration
      EffectiveSolve<double> solve(system);
      solve.factor(system, c_c, c_k, tangent.data());
      solve.solve(system, x.data());
      const Eigen::MatrixXd band =
          mass_matrix(system) + c_c * dense(system.damping) + c_k * tangent_stiffness(system, tangent);
      const Eigen::MatrixXd full = band + c_c * (dense_damping(system) - dense(system.damping));
      const Eigen::VectorXd expected = full.ldlt().solve(b);
      const double tolerance = 8 * n * 2.3e-16 * (condition(full) + condition(band)) * expected.norm();
      EXPECT_LE((Eigen::Map<Eigen::VectorXd>(x.data(), n) - expected).norm(), tolerance) << n;
    }
}

// A linear system keeps its factors only while the coefficients stay.
TEST(EffectiveSolve, FactorsAgainWhenTheStepChanges) {
  Stick stick = linear_stick({2e4, 1e4}, {3e7, 2e7});
  stick.damping = ModalDamping{{0.05}};
  const System system = assemble(stick);
  EffectiveSolve<double> kept(system);
  for (const double dt : {0.01, 0.01, 0.005, 0.02}) {
    EffectiveSolve<double> fresh(system);
    std::vector<double> x{1e3, -2e3}, y = x, none(system.elements);
    kept.factor(system, dt / 2, dt * dt / 4, none.data());
    fresh.factor(system, dt / 2, dt * dt / 4, none.data());
    kept.solve(system, x.data());
    fresh.solve(system, y.data());
    EXPECT_EQ(x, y) << dt;
  }
}

TEST(EffectiveSolve, PacksGiveTheScalarBits) {
  std::mt19937 dice(28);
  Stick stick = random_stick(5, dice);
  stick.damping = ModalDamping{{0.05}};
  const System system = assemble(stick);
  using R = Pack<4>;
  std::vector<R> tangent(system.elements), x(5);
  std::vector<std::vector<double>> tangents(4, std::vector<double>(system.elements)), xs(4, std::vector<double>(5));
  for (int w = 0; w < 4; ++w) {
    for (int e = 0; e < system.elements; ++e) set_lane(tangent[e], w, tangents[w][e] = 1e7 * (1 + w + e));
    for (int i = 0; i < 5; ++i) set_lane(x[i], w, xs[w][i] = 1e3 * (i - w - 0.5));
    EffectiveSolve<double> solve(system);
    solve.factor(system, 0.005, 2.5e-5, tangents[w].data());
    solve.solve(system, xs[w].data());
  }
  EffectiveSolve<R> solve(system);
  solve.factor(system, splat<R>(0.005), splat<R>(2.5e-5), tangent.data());
  solve.solve(system, x.data());
  for (int w = 0; w < 4; ++w)
    for (int i = 0; i < 5; ++i) EXPECT_EQ(lane(x[i], w), xs[w][i]);
}

}  // namespace
}  // namespace pilotis
