// One freedom against printed tables and closed forms.
#include <random>

#include "integrators/runs.hpp"
#include "tests/integrators/support.hpp"

namespace pilotis::test {
namespace {

constexpr double gravity = 386.1;       // in/s2
constexpr double last_digit = 0.0001;   // of the tables below
constexpr double half_a_digit = 0.005;  // of printed peaks

// Half-cycle sine pulse. Chopra, Dynamics of Structures, ch. 5, worked examples (from memory; recomputed). kip, in.
// The tables carry numbers rounded to four digits from line to line: one unit of the last printed digit is allowed.
class SinePulse : public ::testing::Test {
 protected:
  const System system_ = assemble(single(0.2533, 10, 0.05));

  // p(t) = 10 sin(pi t / 0.6) to 0.6 s, sampled.
  Load pulse(double sampling) const {
    FloorForce force{1, {}, {}};
    const long last = std::lround(0.6 / sampling);
    for (long i = 0; i <= last; ++i) {
      force.times.push_back(i * sampling);
      force.forces.push_back(i == last ? 0.0 : 10 * std::sin(pi * i * sampling / 0.6));
    }
    return Load(system_, nullptr, 1, {force});
  }

  void expect_printed(const Scheme& scheme, double sampling, const std::vector<double>& printed) const {
    const Marched run = marched(system_, pulse(sampling), scheme, 0.1, 10, {}, 1e-12);
    ASSERT_EQ(run.track.u.size(), printed.size());
    for (std::size_t i = 0; i < printed.size(); ++i)
      EXPECT_NEAR(run.track.u[i][0], printed[i], last_digit) << scheme.description() << " at " << 0.1 * i << " s";
  }
};

TEST_F(SinePulse, InterpolationOfExcitation) {
  expect_printed(*scheme_of("piecewise_exact"), 0.1,
                 {0, 0.0318, 0.2274, 0.6336, 1.1339, 1.4896, 1.4480, 0.9037, 0.0579, -0.7578, -1.2432});
}
TEST_F(SinePulse, CentralDifference) {
  expect_printed(*scheme_of("newmark", {0, 0.5}), 0.1,
                 {0, 0, 0.1914, 0.6293, 1.1825, 1.5808, 1.5412, 0.9141, -0.0247, -0.8968, -1.3726});
}
TEST_F(SinePulse, AverageAcceleration) {
  expect_printed(*scheme_of("average_acceleration"), 0.1,
                 {0, 0.0437, 0.2326, 0.6121, 1.0825, 1.4309, 1.4231, 0.9622, 0.1908, -0.6044, -1.1442});
}
TEST_F(SinePulse, LinearAcceleration) {
  expect_printed(*scheme_of("linear_acceleration"), 0.1,
                 {0, 0.0300, 0.2193, 0.6166, 1.1130, 1.4782, 1.4625, 0.9514, 0.1273, -0.6954, -1.2208});
}
// Linear interpolation of a sine sampled at 0.001 s errs by (pi 0.001 / 0.6)^2 / 8 of it: below 4e-6.
TEST_F(SinePulse, Theory) {
  const std::vector<double> theory{0, 0.0328, 0.2332, 0.6487, 1.1605, 1.5241, 1.4814, 0.9245, 0.0593, -0.7751, -1.2718};
  for (const auto& scheme : {scheme_of("piecewise_exact"), scheme_of("fehlberg", {1e-10, 1e-12}),
                             scheme_of("dormand_prince", {1e-10, 1e-12})}) {
    const Marched run = marched(system_, pulse(0.001), *scheme, 0.001, 1000, {}, 1e-12);
    for (std::size_t i = 0; i < theory.size(); ++i)
      EXPECT_NEAR(run.track.u[100 * i][0], theory[i], last_digit) << scheme->description() << " at " << 0.1 * i << " s";
  }
}

// Peak deformation of an elastic system, in, over states every dt.
double elastic_peak(double period, double ratio, double dt) {
  const double omega = 2 * pi / period;
  const System system = assemble(single(1, omega * omega, ratio));
  const Accelerogram record = el_centro(gravity);
  const Marched run =
      marched(system, Load(system, &record, 1, {}), *scheme_of("piecewise_exact"), dt, std::lround(31.5 / dt));
  return largest(run.track.u);
}

// Chopra, ch. 6 (from memory; recomputed): states at the record's own step.
TEST(ElCentro, Elastic) {
  SKIP_WITHOUT_EL_CENTRO();
  EXPECT_NEAR(elastic_peak(0.5, 0.02, 0.02), 2.67, half_a_digit);
  EXPECT_NEAR(elastic_peak(1.0, 0.02, 0.02), 5.97, half_a_digit);
  EXPECT_NEAR(elastic_peak(2.0, 0.02, 0.02), 7.47, half_a_digit);
  EXPECT_NEAR(elastic_peak(2.0, 0.0, 0.02), 9.91, half_a_digit);
  EXPECT_NEAR(elastic_peak(2.0, 0.05, 0.02), 5.37, half_a_digit);
}

// Chopra, ch. 7 (from memory; recomputed): T = 0.5 s, 5 %, elastoplastic, yield strength over the elastic demand.
// Steps so small that sampling leaves nothing. Half a unit of the peak's own last digit, and as much again below the
// first because the strengths are shares of an elastic peak printed to the same digit. The printed ductilities are
// quotients of the rounded peaks: 2.07 / (0.125 2.25) = 7.36.
TEST(ElCentro, Elastoplastic) {
  SKIP_WITHOUT_EL_CENTRO();
  const double omega = 2 * pi / 0.5, k = omega * omega, elastic = elastic_peak(0.5, 0.05, 0.0005);
  const double strengths[] = {1, 0.5, 0.25, 0.125}, peaks[] = {2.25, 1.62, 1.75, 2.07},
               ductilities[] = {1, 1.44, 3.11, 7.36};
  const Accelerogram record = el_centro(gravity);
  for (int i = 0; i < 4; ++i) {
    const double yield = strengths[i] * elastic;
    Stick stick = stick_of(1, 1, 1, Bilinear{k, k * yield, 0});
    stick.damping = ModalDamping{{0.05}};
    const System system = assemble(stick);
    const Marched run =
        marched(system, Load(system, &record, 1, {}), *scheme_of("average_acceleration"), 0.0005, 40 * 1575);
    EXPECT_NEAR(largest(run.track.u), peaks[i], i == 0 ? half_a_digit : 2 * half_a_digit) << strengths[i];
    EXPECT_NEAR(largest(run.track.u) / yield, ductilities[i],
                ductilities[i] * half_a_digit * (2 / peaks[i] + 1 / peaks[0]))
        << strengths[i];
  }
}

// Biggs, Introduction to Structural Dynamics (1964): undamped, elastoplastic, constant force F applied at once:
// ductility 1 / (2 (1 - F/R)). The step error that the run itself estimates is the tolerance, and must be small.
TEST(SuddenForce, Ductility) {
  const double k = 4 * pi * pi, resistance = 10;
  for (const auto& scheme : {scheme_of("average_acceleration"), scheme_of("linear_acceleration"),
                             scheme_of("hht_alpha", {-0.05}), scheme_of("newmark", {0, 0.5}),
                             scheme_of("dormand_prince", {1e-9, 1e-12}), scheme_of("fehlberg", {1e-9, 1e-12})})
    for (const auto& [share, ductility] : {std::pair{0.5, 1.0}, {0.75, 2.0}, {0.9, 5.0}}) {
      const System system = assemble(stick_of(1, 1, 1e3, Bilinear{k, resistance, 0}));
      const Load load(system, nullptr, 1, {{1, {0, 10}, {share * resistance, share * resistance}}});
      RunPlan plan;
      plan.scheme = scheme, plan.step = 0.001, plan.duration = 5, plan.fundamental_period = 1;
      const RunResult result = run_once(system, load, plan);
      const Peak& peak = result.peaks[ResponseLayout(1).offset(*find_quantity("ductility"))];
      EXPECT_NEAR(peak.value, ductility, peak.step_error + 1e-8) << scheme->description() << " at F/R " << share;
      EXPECT_LT(peak.step_error, 0.002 * ductility) << scheme->description() << " at F/R " << share;
    }
}

// Steady amplification 1 / sqrt((1 - r^2)^2 + (2 zeta r)^2) (closed form). The transient has decayed to exp(-zeta omega
// t) of itself; the sampled sine loses (2 pi / 200)^2 / 12 of its amplitude, and its peak at most (2 pi / 200)^2 / 8.
TEST(Harmonic, SteadyAmplification) {
  const double zeta = 0.05, omega = 2 * pi;
  const System system = assemble(single(1, omega * omega, zeta));
  for (double r : {0.5, 0.9, 1.0, 1.1, 2.0}) {
    const double period = 1 / r, dt = period / 200;
    const int cycles = static_cast<int>(std::ceil(40 * r));
    FloorForce force{1, {}, {}};
    for (int i = 0; i <= 200 * (cycles + 1); ++i) {
      force.times.push_back(i * dt);
      force.forces.push_back(std::sin(2 * pi * i / 200));
    }
    const Marched run =
        marched(system, Load(system, nullptr, 1, {force}), *scheme_of("piecewise_exact"), dt, 200 * (cycles + 1));
    double peak = 0;
    for (std::size_t i = run.track.u.size() - 200; i < run.track.u.size(); ++i)
      peak = std::max(peak, std::abs(run.track.u[i][0]));
    const double amplification = 1 / std::hypot(1 - r * r, 2 * zeta * r);
    const double transient = std::exp(-zeta * omega * cycles * period) * amplification * 2,
                 sampling = std::pow(2 * pi / 200, 2) * (1.0 / 8 + 1.0 / 12);
    EXPECT_NEAR(peak * omega * omega, amplification, transient + sampling * amplification) << r;
  }
}

// White noise of two-sided density S0 per rad/s: variance pi S0 / (2 zeta omega^3) (Crandall & Mark 1963). Samples of
// variance 2 pi S0 / dt, linear between, have the density S0 sinc^4(omega dt / 2), hence the small factor. The variance
// measured over a time L scatters by 1 / sqrt(zeta omega L) of itself; four times that is allowed.
TEST(WhiteNoise, Variance) {
  const double zeta = 0.05, omega = 2 * pi, dt = 0.02, density = 1;
  const long steps = 2'000'000, skipped = 5'000;
  std::mt19937_64 random(20260101);
  std::normal_distribution<double> normal(0, std::sqrt(2 * pi * density / dt));
  Accelerogram record{dt, 0, {}};
  for (long i = 0; i <= steps; ++i) record.samples.push_back(normal(random));
  const System system = assemble(single(1, omega * omega, zeta));
  const Marched run = marched(system, Load(system, &record, 1, {}), *scheme_of("piecewise_exact"), dt, steps);
  double sum = 0;
  for (std::size_t i = skipped; i < run.track.u.size(); ++i) sum += run.track.u[i][0] * run.track.u[i][0];
  const double half = omega * dt / 2, interpolation = std::pow(std::sin(half) / half, 4);
  const double expected = pi * density / (2 * zeta * omega * omega * omega) * interpolation;
  const double scatter = 1 / std::sqrt(zeta * omega * dt * static_cast<double>(steps - skipped));
  EXPECT_NEAR(sum / static_cast<double>(run.track.u.size() - skipped) / expected, 1, 4 * scatter);
}

// A story with gravity load P has the lateral stiffness k - P/h (closed form; Chopra, ch. 9): its free vibration is the
// cosine of sqrt((k - P/h) / m).
TEST(PDelta, PeriodOfFreeVibration) {
  const double m = 1000, k = 4e4, h = 3;
  Stick stick = stick_of(1, m, h, Linear{k});
  stick.p_delta = true;
  const System system = assemble(stick);
  const double omega = std::sqrt((k - m * stick.gravity / h) / m);
  const Load none(system, nullptr, 1, {});
  const Marched exact = marched(system, none, *scheme_of("piecewise_exact"), 0.05, 400, {{0.01}, {}});
  const Marched adaptive = marched(system, none, *scheme_of("fehlberg", {1e-12, 1e-14}), 0.05, 400, {{0.01}, {}});
  for (std::size_t i = 0; i < exact.track.u.size(); ++i) {
    EXPECT_NEAR(exact.track.u[i][0], 0.01 * std::cos(omega * exact.track.time[i]), 1e-12);
    EXPECT_NEAR(adaptive.track.u[i][0], 0.01 * std::cos(omega * adaptive.track.time[i]), 1e-9);
  }
}

}  // namespace
}  // namespace pilotis::test
