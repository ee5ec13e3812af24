// Free vibration of one freedom step by step: period, decay, stability, against printed values and against what the
// schemes say of themselves.
#include <Eigen/Eigenvalues>
#include <complex>

#include "tests/integrators/support.hpp"

namespace pilotis::test {
namespace {

// The matrix that takes [u, v dt, a dt^2] over one step at omega dt, undamped, found by marching unit states.
Eigen::Matrix3d amplification(const Scheme& scheme, double omega_dt) {
  const System system = assemble(single(1, omega_dt * omega_dt, 0));
  const double zero[] = {0};
  const auto stepper = scheme.prepare(system, {1, 1e-12 * std::max(1.0, omega_dt * omega_dt)});
  Eigen::Matrix3d matrix;
  for (int j = 0; j < 3; ++j) {
    State<double> state = state_at_rest<double>(system);
    (j == 0 ? state.u : j == 1 ? state.v : state.a)[0] = 1;
    EXPECT_EQ(stepper->step(state, {1, zero, zero}).status, StepStatus::done);
    matrix.col(j) << state.u[0], state.v[0], state.a[0];
  }
  return matrix;
}

struct Principal {
  double angle, size;  // of the root that turns with omega dt
};

Principal principal_root(const Scheme& scheme, double omega_dt) {
  Principal found{0, 0};
  for (const std::complex<double> root : amplification(scheme, omega_dt).eigenvalues())
    if (std::arg(root) > 0 &&
        (found.angle == 0 || std::abs(std::arg(root) - omega_dt) < std::abs(found.angle - omega_dt)))
      found = {std::arg(root), std::abs(root)};
  return found;
}

bool marched_as_a_matrix(const Scheme& scheme) { return scheme.traits().implicit; }

Marched free_vibration(const Scheme& scheme, double omega_dt, long steps) {
  const System system = assemble(single(1, omega_dt * omega_dt, 0));
  return marched(system, Load(system, nullptr, 1, {}), scheme, 1, steps, {{1}, {}},
                 1e-12 * std::max(1.0, omega_dt * omega_dt));
}

// Period over the exact one, from three successive displacements of a march without decay: u2 + u0 = 2 cos(angle) u1.
double period_ratio(const Marched& run, double omega_dt) {
  const auto& u = run.track.u;
  return omega_dt / std::acos((u[2][0] + u[0][0]) / (2 * u[1][0]));
}

// Newmark 1959 (closed form): T'/T = W / (2 arctan(W/2)); printed elongations at dt/T = 0.1, 0.2, 0.3.
TEST(AverageAcceleration, PeriodElongationWithoutDecay) {
  const auto scheme = scheme_of("average_acceleration");
  for (const auto& [share, percent] : {std::pair{0.1, 3.207}, {0.2, 12.003}, {0.3, 24.700}}) {
    const double omega_dt = 2 * pi * share;
    const Marched run = free_vibration(*scheme, omega_dt, 20000);
    EXPECT_NEAR(100 * (period_ratio(run, omega_dt) - 1), percent, 0.0005);
    const double energy = std::pow(run.state.u[0], 2) + std::pow(run.state.v[0] / omega_dt, 2);
    EXPECT_NEAR(energy, 1, 1e-9) << "after 20000 steps at dt/T " << share;
  }
}

// Linear acceleration is stable to dt/T = sqrt(3)/pi = 0.5513, central difference to 1/pi (Newmark 1959; closed form).
// Just below, the amplitude stays within that of the slow beat, 1/sin of the angle left to pi; just above it grows
// without end.
TEST(Stability, LimitsOfNewmark) {
  for (const auto& [scheme, limit] :
       {std::pair{scheme_of("linear_acceleration"), std::sqrt(3.0) / pi}, {scheme_of("newmark", {0, 0.5}), 1 / pi}}) {
    EXPECT_NEAR(scheme->traits().stability_limit, 2 * pi * limit, 1e-12) << scheme->description();
    EXPECT_LT(largest(free_vibration(*scheme, 2 * pi * limit * 0.999, 2000).track.u), 100) << scheme->description();
    EXPECT_GT(largest(free_vibration(*scheme, 2 * pi * limit * 1.001, 2000).track.u), 1e20) << scheme->description();
  }
  EXPECT_NEAR(std::sqrt(3.0) / pi, 0.5513, 0.00005);
}

// Every stability limit a scheme claims: no root outside the unit circle just below, one just above.
TEST(Stability, LimitsOfTheCatalogue) {
  for (const auto& scheme : all_schemes()) {
    const double limit = scheme->traits().stability_limit;
    if (!marched_as_a_matrix(*scheme) || !std::isfinite(limit)) continue;
    EXPECT_LE(amplification(*scheme, limit * 0.999).eigenvalues().cwiseAbs().maxCoeff(), 1 + 1e-9)
        << scheme->description();
    EXPECT_GT(amplification(*scheme, limit * 1.001).eigenvalues().cwiseAbs().maxCoeff(), 1 + 1e-4)
        << scheme->description();
  }
}

// Unconditional: no root outside the circle anywhere. A double root on the circle is known to the root of the rounding.
TEST(Stability, Unconditional) {
  for (const auto& scheme : all_schemes()) {
    if (!marched_as_a_matrix(*scheme) || std::isfinite(scheme->traits().stability_limit)) continue;
    for (double omega_dt = 0.01; omega_dt < 1e4; omega_dt *= 1.3)
      EXPECT_LE(amplification(*scheme, omega_dt).eigenvalues().cwiseAbs().maxCoeff(), 1 + 1e-6)
          << scheme->description() << " at omega dt " << omega_dt;
  }
}

// At omega dt = 1e6 the roots differ from those at infinity by the perturbation 1e-12, a triple one by its cube root.
TEST(SpectralRadius, AtInfiniteFrequencyAsClaimed) {
  for (const auto& scheme : all_schemes()) {
    if (!marched_as_a_matrix(*scheme)) continue;
    const double radius = amplification(*scheme, 1e6).eigenvalues().cwiseAbs().maxCoeff(),
                 claimed = scheme->traits().spectral_radius;
    if (std::isfinite(claimed))
      EXPECT_NEAR(radius, claimed, 3e-4) << scheme->description();
    else
      EXPECT_GT(radius, 1e6) << scheme->description();
  }
}

// Hilber, Hughes & Taylor 1977: (1 + alpha)/(1 - alpha); printed 0.905 at -0.05, 0.5 at -1/3. Seen in a march: a state
// of a very high mode shrinks by that factor a step once the smaller root has died out.
TEST(SpectralRadius, OfHhtInAMarch) {
  for (const auto& [alpha, printed] : {std::pair{-0.05, 0.905}, {-1.0 / 3, 0.5}}) {
    const auto scheme = scheme_of("hht_alpha", {alpha});
    EXPECT_NEAR(scheme->traits().spectral_radius, printed, 0.0005);
    EXPECT_NEAR((1 + alpha) / (1 - alpha), printed, 0.0005);
  }
  // Double root: |u_n| grows as n rho^n, hence the factor (n + 1)/n of two successive ratios in the limit.
  const double alpha = -0.1;
  const Marched run = free_vibration(*scheme_of("hht_alpha", {alpha}), 1e5, 80);
  for (int n = 60; n < 80; ++n) {
    const double ratio = std::abs(run.track.u[n + 1][0] / run.track.u[n][0]), rho = (1 + alpha) / (1 - alpha);
    EXPECT_GT(ratio, rho * (1 - 1.0 / n)) << n;
    EXPECT_LT(ratio, rho * (1 + 2.0 / n)) << n;
  }
}

// What accurate_omega_dt says: period and amplitude a cycle err by about 0.2 %. "About" is taken as a tenth more.
TEST(AccurateStep, PeriodAndAmplitudeWithinTwoThousandths) {
  for (const auto& scheme : all_schemes()) {
    if (!marched_as_a_matrix(*scheme)) continue;
    const double omega_dt = scheme->traits().accurate_omega_dt;
    const Principal root = principal_root(*scheme, omega_dt);
    EXPECT_NEAR(omega_dt / root.angle, 1, 0.0022) << scheme->description() << " at omega dt " << omega_dt;
    EXPECT_NEAR(std::pow(root.size, 2 * pi / root.angle), 1, 0.0022)
        << scheme->description() << " at omega dt " << omega_dt;
    EXPECT_GT(std::abs(omega_dt / root.angle - 1) + std::abs(std::pow(root.size, 2 * pi / root.angle) - 1),
              omega_dt < 0.29 ? 0.0008 : 0)
        << scheme->description() << ": the step could be longer";
  }
}

// Schemes without an amplification matrix of their own: exact at any step.
TEST(AccurateStep, ExactSchemesAreExact) {
  for (const auto& scheme : all_schemes()) {
    if (scheme->traits().order != 0) continue;
    for (double omega_dt : {0.1, 3.0, 50.0}) {
      const Marched run = free_vibration(*scheme, omega_dt, 50);
      for (std::size_t n = 0; n < run.track.u.size(); ++n)
        EXPECT_NEAR(run.track.u[n][0], std::cos(omega_dt * static_cast<double>(n)), 1e-11) << scheme->description();
    }
  }
}

}  // namespace
}  // namespace pilotis::test
