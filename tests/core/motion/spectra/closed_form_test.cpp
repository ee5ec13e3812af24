// The spectrum kernel against closed forms.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/spectra/free_vibration.hpp"
#include "core/motion/spectra/recurrence.hpp"
#include "core/motion/spectra/response_spectrum.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;

OscillatorExtremes seen(const Ground& ground, Oscillator oscillator, StepRule rule = {}) {
  OscillatorExtremes extremes;
  oscillator_extremes(ground, {&oscillator, 1}, rule, {&extremes, 1}, "test");
  return extremes;
}

template <class F>
std::vector<double> sampled(F f, double step, int count) {
  std::vector<double> samples;
  for (int i = 0; i < count; ++i) samples.push_back(f(i * step));
  return samples;
}

// The coefficients as Nigam & Jennings 1969 print them (from memory), where their closed forms lose few digits. There
// a_g is the ground acceleration and u'' + 2 zeta omega u' + omega^2 u = -a_g.
TEST(Recurrence, IsNigamAndJennings) {
  for (const double zeta : {0.0, 0.05, 0.3, 0.95})
    for (const double h_over_t : {0.1, 0.05, 0.025}) {
      const double T = 0.7, h = h_over_t * T, w = 2 * pi / T, root = std::sqrt(1 - zeta * zeta), wd = w * root;
      const double e = std::exp(-zeta * w * h), s = std::sin(wd * h), c = std::cos(wd * h);
      const Recurrence r = recurrence({T, zeta}, h);
      const double tiny = 1e-15 / std::pow(w * h, 3);  // what the closed forms lose
      EXPECT_NEAR(r.a_uu, e * (zeta / root * s + c), 4e-15);
      EXPECT_NEAR(r.a_uv * w, e / root * s, 4e-15);
      EXPECT_NEAR(r.a_vu / w, -e / root * s, 4e-15);
      EXPECT_NEAR(r.a_vv, e * (c - zeta / root * s), 4e-15);
      const double k1 = (2 * zeta * zeta - 1) / (w * w * h), k2 = 2 * zeta / (w * w * w * h);
      EXPECT_NEAR(r.b_u0 * w * w, w * w * (e * ((k1 + zeta / w) * s / wd + (k2 + 1 / (w * w)) * c) - k2), tiny);
      EXPECT_NEAR(r.b_u1 * w * w, w * w * (-e * (k1 * s / wd + k2 * c) - 1 / (w * w) + k2), tiny);
      const double rate_s = c - zeta / root * s, rate_c = wd * s + zeta * w * c;
      EXPECT_NEAR(r.b_v0 * w, w * (e * ((k1 + zeta / w) * rate_s - (k2 + 1 / (w * w)) * rate_c) + 1 / (w * w * h)),
                  tiny);
      EXPECT_NEAR(r.b_v1 * w, w * (-e * (k1 * rate_s - k2 * rate_c) - 1 / (w * w * h)), tiny);
    }
}

// A suddenly applied acceleration p held for good: u = -p/omega^2 (1 - exp(..)(cos + ..sin)), largest after half a
// damped period, 1 + exp(-pi zeta / sqrt(1 - zeta^2)) times the static one; undamped 2. A pulse of half a period or
// longer reaches the same. Chopra, ch. 4 (from memory).
TEST(StepPulse, OvershootsByTheClosedForm) {
  const double T = 1, h = 0.01, p = 2;
  const std::vector<double> held(400, p);
  for (const double zeta : {0.0, 0.02, 0.2, 0.7}) {
    const double still = p * T * T / (4 * pi * pi);
    const double wanted = still * (1 + std::exp(-pi * zeta / std::sqrt(1 - zeta * zeta)));
    // Sampled every hundredth of a period: at most (pi / 100)^2 / 2 missed.
    EXPECT_NEAR(-seen({held, h}, {T, zeta}).displacement.low, wanted, wanted * 5e-4) << zeta;
  }
  const std::vector<double> half_period(51, p);  // from 0 to T/2, then back to zero within a step
  EXPECT_NEAR(-seen({half_period, h}, {T, 0}).displacement.low, 2 * p * T * T / (4 * pi * pi),
              5e-4 * p * T * T / (2 * pi * pi));
}

// Half-sine pulse a sin(pi t / d) of the ground, undamped, b = T / (2 d). A pulse shorter than T/2 (b > 1) has its peak
// after its end, 2 b cos(pi / (2 b)) / (b^2 - 1) times the static one; up to d = 3 T / 2 the peak is the first one
// within the pulse, sin(2 pi b / (1 + b)) / (1 - b). Chopra, ch. 4, half-cycle sine pulse (from memory).
TEST(HalfSinePulse, HasTheShockSpectrumOfTheTextbook) {
  const double d = 1, a = 3;
  const int count = 2001;
  const std::vector<double> pulse = sampled([&](double t) { return a * std::sin(pi * t / d); }, d / (count - 1), count);
  for (const double ratio : {0.1, 0.2, 0.3, 0.4, 0.6, 0.75, 1.0, 1.25}) {
    const double T = d / ratio, b = 1 / (2 * ratio);
    const double factor =
        b > 1 ? 2 * b * std::cos(pi / (2 * b)) / (b * b - 1) : std::sin(2 * pi * b / (1 + b)) / (1 - b);
    const OscillatorExtremes found = seen({pulse, d / (count - 1)}, {T, 0});
    // The polygon through the samples errs by (pi h / d)^2 / 8, the sampled peak by (pi h / T)^2 / 2: below 3e-6 both.
    EXPECT_NEAR(found.displacement.largest() * 4 * pi * pi / (T * T), a * factor, a * factor * 3e-6) << ratio;
    EXPECT_NEAR(found.acceleration.largest(), a * factor, a * factor * 3e-6) << ratio;  // undamped: omega^2 u
  }
}

// The steady amplification 1 / sqrt((1 - r^2)^2 + (2 zeta r)^2) (PUBLISHED E). The wave swells over 200 periods, holds
// and dies away as slowly. What the bend of the swell, (pi / (200 T))^2 / 2, excites is that over (zeta w)^2: 3.2e-4.
TEST(HarmonicGround, ReachesTheSteadyAmplification) {
  const double T = 0.8, w = 2 * pi / T, zeta = 0.1, h = 0.002, a = 1.7;
  const int ramp = static_cast<int>(200 * T / h), count = 3 * ramp + 1;
  for (const double r : {0.3, 0.7, 1.0, 1.5}) {
    std::vector<double> wave = sampled([&](double t) { return a * std::sin(r * w * t); }, h, count);
    for (int i = 0; i < ramp; ++i) {
      const double swell = 0.5 * (1 - std::cos(pi * i / ramp));
      wave[i] *= swell;
      wave[count - 1 - i] *= swell;
    }
    const double wanted = a / (w * w) / std::hypot(1 - r * r, 2 * zeta * r);
    EXPECT_NEAR(seen({wave, h}, {T, zeta}).displacement.largest(), wanted, wanted * 3.2e-4) << r;
  }
}

// Transient at resonance, undamped: u = -a / (2 omega^2) (sin wt - wt cos wt); after n whole cycles the amplitude is
// n pi a / omega^2, and it stays that in the free vibration that follows.
TEST(HarmonicGround, ResonanceGrowsByPiACycle) {
  const double T = 1, w = 2 * pi / T, a = 1, h = T / 1000;
  const int cycles = 5;
  const std::vector<double> wave = sampled([&](double t) { return a * std::sin(w * t); }, h, cycles * 1000 + 1);
  const double wanted = cycles * pi * a / (w * w);
  const OscillatorExtremes found = seen({wave, h}, {T, 0});
  EXPECT_NEAR(found.displacement.high, wanted, wanted * 1e-5);  // sampling and the polygon: (2 pi / 1000)^2 / 8 = 5e-6
  EXPECT_NEAR(found.displacement.low, -wanted, wanted * 1e-5);  // in free vibration both sides are the same
  EXPECT_NEAR(found.velocity.largest(), wanted * w, wanted * w * 1e-5);
}

// From the state u0, v0 the free vibration is exp(-zeta w t)(..): its first two extremes against a fine walk.
TEST(FreeVibration, FirstTwoExtremes) {
  for (const double zeta : {0.0, 0.05, 0.6})
    for (const auto& [u0, v0] :
         {std::pair{1.0, 0.3}, {-1.0, 0.3}, {0.0, -2.0}, {0.5, -4.0}, {-0.2, -1.0}, {1.0, 0.0}}) {
      const double T = 1.3, w = 2 * pi / T, wd = w * std::sqrt(1 - zeta * zeta);
      double low = 1e9, high = -1e9;
      for (int i = 1; i <= 200000; ++i) {
        const double t = 1.5 * T / std::sqrt(1 - zeta * zeta) * i / 200000;
        const double u =
            std::exp(-zeta * w * t) * (u0 * std::cos(wd * t) + (v0 + zeta * w * u0) / wd * std::sin(wd * t));
        low = std::min(low, u);
        high = std::max(high, u);
      }
      const Swing swing = free_vibration({T, zeta}, u0, v0);
      // The walk also holds its start, which is no extreme when u0 falls back from there.
      EXPECT_NEAR(std::max({swing.first, swing.second, u0}), std::max(high, u0), 1e-8)
          << zeta << " " << u0 << " " << v0;
      EXPECT_NEAR(std::min({swing.first, swing.second, u0}), std::min(low, u0), 1e-8) << zeta << " " << u0 << " " << v0;
    }
}

// An impulse shorter than any step of the oscillator: all of the response is free vibration, after the record.
// u_max = I / omega exp(-zeta theta / root) with theta = arccos zeta (Clough & Penzien; from memory).
TEST(FreeVibration, FollowsTheRecordToItsEnd) {
  const double h = 0.001, T = 4, w = 2 * pi / T;
  const std::vector<double> blow{0, 1, 0};
  for (const double zeta : {0.0, 0.05, 0.5}) {
    const double root = std::sqrt(1 - zeta * zeta), wanted = h / w * std::exp(-zeta / root * std::acos(zeta));
    EXPECT_NEAR(-seen({blow, h}, {T, zeta}).displacement.low, wanted, wanted * w * w * h * h) << zeta;
  }
}

TEST(Spectrum, RigidAndVeryLongPeriods) {
  const double h = 0.01;
  const std::vector<double> wave = sampled([](double t) { return std::exp(-t) * std::sin(9 * t) * 5; }, h, 600);
  const std::vector<double> periods{0, 0.001, 1000};
  const double zeta = 0.05;
  const SpectrumCurve curve = response_spectrum({wave, h}, periods, {&zeta, 1}, "test").curves[0];
  double peak = 0, displacement = 0, velocity = 0, moved = 0;
  for (std::size_t i = 1; i < wave.size(); ++i) {  // the ground's own displacement, linear acceleration
    moved += h * velocity + h * h * (2 * wave[i - 1] + wave[i]) / 6;
    velocity += h * (wave[i - 1] + wave[i]) / 2;
    displacement = std::max(displacement, std::abs(moved));
    peak = std::max(peak, std::abs(wave[i]));
  }
  EXPECT_EQ(curve.acceleration[0], peak);
  EXPECT_EQ(curve.pseudo_acceleration[0], peak);
  EXPECT_EQ(curve.displacement[0], 0);
  EXPECT_NEAR(curve.acceleration[1], peak, 1e-3 * peak);  // 9 rad/s over 6283 rad/s, squared, and kinks of the polygon
  // A soft oscillator's mass stays in space while the ground moves under it, as long as the record is short beside T.
  EXPECT_GT(curve.displacement[2], 0.97 * displacement);
}

// Extremes keep their signs: the same ground upside down changes them over, and nothing else.
TEST(Spectrum, UpsideDown) {
  const double h = 0.02;
  std::vector<double> wave = sampled([](double t) { return std::sin(3 * t) + 0.5 * std::cos(11 * t); }, h, 500);
  const OscillatorExtremes up = seen({wave, h}, {0.4, 0.03});
  for (double& a : wave) a = -a;
  const OscillatorExtremes down = seen({wave, h}, {0.4, 0.03});
  EXPECT_EQ(up.displacement.low, -down.displacement.high);
  EXPECT_EQ(up.velocity.high, -down.velocity.low);
  EXPECT_EQ(up.acceleration.high, -down.acceleration.low);
}

// A first sample at one step is a first sample of 0 at t = 0 before it.
TEST(Spectrum, GroundAtRestBeforeTheFirstSample) {
  const double h = 0.02;
  std::vector<double> wave = sampled([](double t) { return std::cos(5 * t); }, h, 300), led{0};
  led.insert(led.end(), wave.begin(), wave.end());
  EXPECT_EQ(seen({wave, h, h}, {0.5, 0.05}).displacement.low, seen({led, h}, {0.5, 0.05}).displacement.low);
  EXPECT_NE(seen({wave, h}, {0.5, 0.05}).displacement.low, seen({led, h}, {0.5, 0.05}).displacement.low);
}

// ceil(10 step / T) as the archives have it, and the same rounded up to 2^k or 3 2^k.
TEST(StepRules, SubdivideAsStated) {
  EXPECT_EQ(subdivision(0.1, 0.01, archive_rule), 1);
  EXPECT_EQ(subdivision(0.0999, 0.01, archive_rule), 2);
  EXPECT_EQ(subdivision(0.04, 0.02, archive_rule), 5);
  EXPECT_EQ(subdivision(0.06, 0.02, archive_rule), 4);
  EXPECT_EQ(subdivision(0, 0.02, archive_rule), 0);
  EXPECT_EQ(subdivision(100, 0.02, archive_rule), 1);
  const std::vector<int> wanted{1, 2, 3, 4, 6, 6, 8, 8, 12, 12, 12, 12, 16};
  for (int m = 1; m <= 13; ++m) EXPECT_EQ(subdivision(0.1 / m, 0.01, {10, false}), wanted[m - 1]) << m;
}

TEST(StandardPeriods, EqualRatios) {
  const std::vector<double> periods = standard_periods();
  ASSERT_EQ(periods.size(), 201u);
  EXPECT_EQ(periods[0], 0);
  EXPECT_EQ(periods[1], 0.01);
  EXPECT_EQ(periods.back(), 10);
  for (std::size_t i = 2; i < periods.size(); ++i)
    EXPECT_NEAR(std::log(periods[i] / periods[i - 1]), std::log(1000.0) / 199, 1e-13);
}

TEST(Refusals, SayWhatIsAllowed) {
  const std::vector<double> wave(10, 1.0), one(1, 1.0), broken{1, NAN};
  const Ground ground{wave, 0.01};
  EXPECT_THROW(seen(ground, {-1, 0.05}), Error);
  EXPECT_THROW(seen(ground, {NAN, 0.05}), Error);
  EXPECT_THROW(seen(ground, {0.00009, 0.05}), Error);  // below a hundredth of the step
  EXPECT_NO_THROW(seen(ground, {0.0001, 0.05}));
  EXPECT_THROW(seen(ground, {1, -0.01}), Error);
  EXPECT_THROW(seen(ground, {1, 1}), Error);
  EXPECT_THROW(seen(ground, {1, NAN}), Error);
  EXPECT_THROW(seen({one, 0.01}, {1, 0.05}), Error);
  EXPECT_THROW(seen({broken, 0.01}, {1, 0.05}), Error);
  EXPECT_THROW(seen({wave, 0}, {1, 0.05}), Error);
  EXPECT_THROW(seen({wave, 0.01, 0.5}, {1, 0.05}), Error);
  EXPECT_THROW(seen(ground, {1, 0.05}, {9}), Error);
  EXPECT_THROW(response_spectrum(ground, {}, std::vector{0.05}, "test"), Error);
  EXPECT_THROW(period_grid(0, 1, 5, "test"), Error);
  EXPECT_THROW(period_grid(1, 1, 5, "test"), Error);
  EXPECT_THROW(period_grid(1, 2, 1, "test"), Error);
  OscillatorExtremes extremes[2];
  const Oscillator oscillator{1, 0.05};
  EXPECT_THROW(oscillator_extremes(ground, {&oscillator, 1}, {}, extremes, "test"), Error);
}

// A response that overflows is marked, not passed over.
TEST(Spectrum, OverflowIsMarked) {
  const std::vector<double> wave(100, 1e308);
  EXPECT_TRUE(std::isnan(seen({wave, 10}, {1000, 0.05}).displacement.high));
}

}  // namespace
}  // namespace pilotis
