// Motions in closed form against what their formulas say of peaks, zeros and integrals.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/synthetic/baseline.hpp"
#include "core/motion/synthetic/near_fault_pulse.hpp"
#include "core/motion/synthetic/ricker.hpp"
#include "core/motion/synthetic/sweep.hpp"
#include "tests/core/motion/synthetic/made.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;
constexpr double rounding = 0.5e-6;  // of a sample, m/s2

// Integrals of the piecewise linear acceleration against the formula's: each step of the trapezoidal rule is wrong by
// dt^3 |a''| / 12, so the velocity by T dt^2 max|a''| / 12 and the displacement by T times that at most; rounding of
// the samples comes on top.
void expect_integrals(const Accelerogram& record, double largest_second_derivative, double lasts, auto velocity,
                      auto displacement) {
  const auto v = ground_velocity(record.samples, record.step), d = ground_displacement(record.samples, record.step);
  const double off = lasts * (record.step * record.step * largest_second_derivative / 12 + rounding);
  for (std::size_t i = 0; i < record.samples.size(); ++i) {
    const double time = static_cast<double>(i) * record.step;
    ASSERT_NEAR(v[i], velocity(time), off) << time;
    ASSERT_NEAR(d[i], displacement(time), off * record.duration()) << time;
  }
}

struct PulseCase {
  double frequency, gamma, nu;
};
class NearFault : public testing::TestWithParam<PulseCase> {
 protected:
  NearFaultPulse pulse() const { return {0.8, GetParam().frequency, GetParam().gamma, GetParam().nu, 10}; }
  Accelerogram record() const {
    return made("near_fault_pulse", {{"amplitude", 0.8},
                                     {"frequency", GetParam().frequency},
                                     {"gamma", GetParam().gamma},
                                     {"nu", GetParam().nu}})
        .record;
  }
};

TEST_P(NearFault, IntegralsAreTheClosedForms) {
  const NearFaultPulse p = pulse();
  // v is half the sum of cosines of weights 1, 1/2, 1/2 and frequencies up to f (1 + 1 / gamma).
  const double third = 0.8 * std::pow(2 * pi * p.frequency * (1 + 1 / p.gamma), 3);
  expect_integrals(
      record(), third, 2 * p.half_length(), [&](double t) { return p.velocity(t); },
      [&](double t) { return p.displacement(t); });
}

// Mavroeidis & Papageorgiou 2003: v(t0) = A cos(nu); at rest at both ends; the ground ends displaced by
// A / (4 pi f_p (1 - gamma^2)) (sin(nu + pi gamma) - sin(nu - pi gamma)).
TEST_P(NearFault, ValuesOfThePaper) {
  const NearFaultPulse p = pulse();
  const auto [frequency, gamma, nu] = GetParam();
  EXPECT_NEAR(p.velocity(10), 0.8 * std::cos(nu), 1e-14);
  for (double end : {10 - p.half_length(), 10 + p.half_length()}) {
    EXPECT_NEAR(p.velocity(end), 0, 1e-14);
    EXPECT_NEAR(p.acceleration(end), 0, 1e-12);
  }
  EXPECT_EQ(p.acceleration(9.999 - p.half_length()), 0);
  const double left =
      0.8 / (4 * pi * frequency * (1 - gamma * gamma)) * (std::sin(nu + pi * gamma) - std::sin(nu - pi * gamma));
  EXPECT_NEAR(p.displacement(20), left, 1e-13);
  // Zero crossings of the carrier: 2 pi f s + nu = pi / 2.
  EXPECT_NEAR(p.velocity(10 + (pi / 2 - nu) / (2 * pi * frequency)), 0, 1e-14);
}

INSTANTIATE_TEST_SUITE_P(Pulses, NearFault,
                         testing::Values(PulseCase{0.5, 2, 0}, PulseCase{0.5, 2, pi / 2}, PulseCase{0.3, 1.5, 1},
                                         PulseCase{1, 3.2, -0.7}, PulseCase{0.25, 1.05, 2}));

TEST(NearFault, RefusesWhatDoesNotFit) {
  const auto make = [](double frequency, double gamma, double center) {
    return made("near_fault_pulse", {{"frequency", frequency}, {"gamma", gamma}, {"center", center}});
  };
  EXPECT_NO_THROW(make(0.5, 2, 2));
  EXPECT_THROW(make(0.5, 2, 1.9), Error);
  EXPECT_THROW(make(0.5, 2, 18.1), Error);
  EXPECT_THROW(make(0.5, 1, 10), Error);
  EXPECT_THROW(make(10.1, 2, 10), Error);  // step coarser than a tenth of the period
}

// Ricker 1953: peak A at t0; zeros at t0 +- 1 / (sqrt(2) pi f); troughs of -2 A exp(-3/2) at t0 +- sqrt(3/2) / (pi f).
TEST(Ricker, PeakZerosAndTroughs) {
  const Ricker wavelet{2, 1.5, 10};
  EXPECT_EQ(wavelet.acceleration(10), 2);
  for (int side : {-1, 1}) {
    EXPECT_NEAR(wavelet.acceleration(10 + side / (std::sqrt(2) * pi * 1.5)), 0, 1e-13);
    const double trough = 10 + side * std::sqrt(1.5) / (pi * 1.5);
    EXPECT_NEAR(wavelet.acceleration(trough), -4 * std::exp(-1.5), 1e-13);
    EXPECT_GT(wavelet.acceleration(trough + 0.01), wavelet.acceleration(trough));
    EXPECT_GT(wavelet.acceleration(trough - 0.01), wavelet.acceleration(trough));
  }
}

// |a''| is largest at t0: d^2/dt^2 (1 - 2 x^2) exp(-x^2) = -6 (pi f)^2 there.
TEST(Ricker, IntegralsAreTheClosedForms) {
  const Ricker wavelet{2, 1.5, 10};
  const Accelerogram record = made("ricker", {{"amplitude", 2}, {"frequency", 1.5}}).record;
  EXPECT_EQ(peak_of(record).value, 2);
  EXPECT_NEAR(peak_of(record).time, 10, 1e-12);
  expect_integrals(
      record, 12 * std::pow(pi * 1.5, 2), 20, [&](double t) { return wavelet.velocity(t); },
      [&](double t) { return wavelet.displacement(t); });
}

TEST(Harmonic, IsTheSineWithItsRamps) {
  const auto samples =
      made("harmonic", {{"amplitude", 2}, {"frequency", 1.25}, {"phase", 0.3}, {"ramp", 4}}).record.samples;
  EXPECT_EQ(samples.front(), 0);
  EXPECT_EQ(samples.back(), 0);
  const auto sine = [](double t) { return 2 * std::sin(2 * pi * 1.25 * t + 0.3); };
  for (std::size_t i : {400u, 777u, 1600u}) EXPECT_NEAR(samples[i], sine(0.01 * double(i)), 1e-6);
  EXPECT_NEAR(samples[100], 0.25 * sine(1), 1e-6);
  EXPECT_NEAR(samples[1900], 0.25 * sine(19), 1e-6);
  EXPECT_NEAR(made("harmonic", {{"phase", 0.3}}).record.samples[0], 3 * std::sin(0.3), 1e-6);
  EXPECT_THROW(made("harmonic", {{"ramp", 10.1}}), Error);
}

// The phase's derivative is 2 pi f(t); here by central differences of 1e-4 s, whose error is (1e-4)^2 phi''' / 6.
TEST(Sweep, FrequencyGoesAsStated) {
  const double h = 1e-4, T = 20;
  for (double t : {1.0, 7.0, 19.0}) {
    const auto frequency = [&](auto phase) {
      return (phase(t + h, 0.5, 10, T) - phase(t - h, 0.5, 10, T)) / (4 * pi * h);
    };
    EXPECT_NEAR(frequency(linear_sweep_phase), 0.5 + 9.5 * t / T, 1e-6);
    EXPECT_NEAR(frequency(logarithmic_sweep_phase), 0.5 * std::pow(20, t / T), 1e-6);
    EXPECT_NEAR(logarithmic_sweep_phase(t, 2, 2, T), 4 * pi * t, 1e-12);
  }
  const auto falling = made("sweep", {{"amplitude", 1}, {"from", 10}, {"to", 0.5}, {"spacing", 1}}).record.samples;
  EXPECT_NEAR(falling[123], std::sin(logarithmic_sweep_phase(1.23, 10, 0.5, T)), 1e-6);
}

double impulse(const Accelerogram& record) { return ground_velocity(record.samples, record.step).back(); }

// Impulses: half sine 2 A d / pi, triangle A d / 2, rectangle A d. The trapezoidal rule on n steps of a half sine is
// short by pi^2 / (12 n^2); rounding as always.
TEST(Pulse, HasTheImpulseOfItsShape) {
  const auto shaped = [](double shape) {
    return made("pulse", {{"amplitude", 2}, {"shape", shape}, {"start", 3}}).record;
  };
  const double slack = 20 * rounding;
  EXPECT_NEAR(impulse(shaped(0)), 4 / pi, 4 / pi * pi * pi / 12e4 + slack);
  EXPECT_NEAR(impulse(shaped(1)), 1, slack);
  EXPECT_NEAR(impulse(shaped(2)), 2, slack);
  for (double shape : {0, 1, 2}) {
    const auto samples = shaped(shape).samples;
    EXPECT_EQ(samples[299], 0) << shape;
    EXPECT_EQ(samples[350], 2) << shape;
    EXPECT_EQ(samples[401], 0) << shape;
  }
}

TEST(Pulse, StepStaysAndStartsAtOnceWhenItStartsTheMotion) {
  const auto late = made("pulse", {{"amplitude", 2}, {"shape", 3}, {"start", 5}}).record.samples;
  EXPECT_EQ(late[499], 0);
  EXPECT_EQ(late[500], 1);
  EXPECT_EQ(late[501], 2);
  EXPECT_EQ(late.back(), 2);
  EXPECT_EQ(made("pulse", {{"amplitude", 2}, {"shape", 3}}).record.samples[0], 2);
}

TEST(Pulse, RefusesWhatDoesNotFit) {
  EXPECT_THROW(made("pulse", {{"start", 19.5}}), Error);                 // ends at 20.5 s
  EXPECT_THROW(made("pulse", {{"length", 0.05}}), Error);                // five steps
  EXPECT_THROW(made("pulse", {{"shape", 2}, {"start", 0.005}}), Error);  // jumps between samples
  EXPECT_NO_THROW(made("pulse", {{"shape", 0}, {"start", 0.005}}));
}

}  // namespace
}  // namespace pilotis
