// RotD50 and RotD100: closed forms, and every angle by the other way round (rotate the ground, then the spectrum).
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/spectra/rotated_spectrum.hpp"
#include "core/motion/spectra/rotation_envelope.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi, step = 0.01, degree = pi / 180;

using Series = std::vector<double>;

template <class F>
Series sampled(F f, int count) {
  Series s;
  for (int i = 0; i < count; ++i) s.push_back(f(i * step));
  return s;
}

Series mixed(const Series& x, double of_x, const Series& y, double of_y) {
  Series s;
  for (std::size_t i = 0; i < x.size(); ++i) s.push_back(of_x * x[i] + of_y * y[i]);
  return s;
}

// Invented: two waves that beat, growing and dying away.
Series wave(double first, double second) {
  return sampled(
      [&](double t) { return t * std::exp(-t / 4) * (std::sin(first * t) + 0.8 * std::sin(second * t + 1)); }, 2500);
}

RotatedPeak rotated(const Series& x, const Series& y, const Oscillator& oscillator) {
  RotatedPeak peak;
  rotated_peaks({x, step}, {y, step}, {&oscillator, 1}, {}, {&peak, 1}, "test");
  return peak;
}

double peak_displacement(const Series& x, const Oscillator& oscillator) {
  OscillatorExtremes extremes;
  oscillator_extremes({x, step}, {&oscillator, 1}, {}, {&extremes, 1}, "test");
  return extremes.displacement.largest();
}

// On a line at 25 degrees with peak P a direction sees P |cos(a - 25)|: largest P, least 0 at 115 degrees, and of the
// 180 values the two in the middle are both P cos 45.
TEST(Rotated, MotionOnALine) {
  const Series along = wave(5, 7), x = mixed(along, std::cos(25 * degree), along, 0),
               y = mixed(along, std::sin(25 * degree), along, 0);
  for (const double period : {0.03, 0.5, 1.1, 6.0}) {
    const Oscillator oscillator{period, 0.05};
    const double peak = peak_displacement(along, oscillator);
    const RotatedPeak found = rotated(x, y, oscillator);
    EXPECT_NEAR(found.largest, peak, 1e-12 * peak);
    EXPECT_NEAR(found.median, peak * std::sqrt(0.5), 1e-12 * peak);
    EXPECT_NEAR(found.least, 0, 1e-12 * peak);
    EXPECT_EQ(found.direction_of_largest, 25);
  }
}

TEST(Rotated, OneComponentAlone) {
  const Series x = wave(4, 9), none(x.size(), 0.0);
  const Oscillator oscillator{0.8, 0.02};
  const double peak = peak_displacement(x, oscillator);
  EXPECT_NEAR(rotated(x, none, oscillator).largest, peak, 1e-14 * peak);
  EXPECT_EQ(rotated(x, none, oscillator).direction_of_largest, 0);
  EXPECT_EQ(rotated(none, x, oscillator).direction_of_largest, 90);
}

// Circular motion that swells and dies away slowly: the same in every direction, with the steady amplitude
// a / omega^2 / sqrt((1 - r^2)^2 + (2 zeta r)^2) (PUBLISHED E). What the swell excites: see
// closed_form_test.cpp, 3.2e-4. Straight lines between the ground's samples take (w r step)^2 / 12 off it, and a
// direction may lie half a step off the instants that are seen, (w r step)^2 / 8.
TEST(Rotated, CircularMotion) {
  const double period = 0.8, w = 2 * pi / period, zeta = 0.1, ramp = 200 * period;
  const auto swell = [&](double t) {
    const double edge = std::min({t / ramp, (3 * ramp - t) / ramp, 1.0});
    return 0.5 * (1 - std::cos(pi * edge));
  };
  for (const double r : {0.5, 1.0, 1.4}) {
    const int count = static_cast<int>(3 * ramp / step) + 1;
    const Series x = sampled([&](double t) { return swell(t) * std::cos(r * w * t); }, count);
    const Series y = sampled([&](double t) { return swell(t) * std::sin(r * w * t); }, count);
    const double wanted = 1 / (w * w) / std::hypot(1 - r * r, 2 * zeta * r);
    const double allowed = 3.2e-4 + std::pow(w * r * step, 2) * (1 / 12.0 + 1 / 8.0);
    const RotatedPeak found = rotated(x, y, {period, zeta});
    EXPECT_NEAR(found.largest, wanted, allowed * wanted) << r;
    EXPECT_NEAR(found.median, wanted, allowed * wanted) << r;
    EXPECT_NEAR(found.least, wanted, allowed * wanted) << r;
  }
}

// The response is linear: the peak in a direction is the peak under the ground's component in that direction.
TEST(Rotated, EveryAngleTheOtherWayRound) {
  const Series x = wave(5, 7), y = wave(6, 11);
  for (const double period : {0.05, 0.3, 0.9, 3.0, 30.0}) {
    const Oscillator oscillator{period, 0.03};
    std::vector<double> peaks;
    for (int a = 0; a < 180; ++a)
      peaks.push_back(peak_displacement(mixed(x, std::cos(a * degree), y, std::sin(a * degree)), oscillator));
    const RotatedPeak found = rotated(x, y, oscillator);
    const int most = static_cast<int>(std::max_element(peaks.begin(), peaks.end()) - peaks.begin());
    std::sort(peaks.begin(), peaks.end());
    EXPECT_EQ(found.direction_of_largest, most) << period;
    EXPECT_NEAR(found.largest, peaks[179], 1e-12 * peaks[179]) << period;
    EXPECT_NEAR(found.median, 0.5 * (peaks[89] + peaks[90]), 1e-12 * peaks[179]) << period;
    EXPECT_NEAR(found.least, peaks[0], 1e-12 * peaks[179]) << period;
  }
}

// T = 0 rotates the ground acceleration itself.
TEST(Rotated, RigidOscillator) {
  const Series x = wave(5, 7), y = wave(6, 11);
  const RotatedSpectrum spectrum = rotated_spectrum({x, step}, {y, step}, std::vector{0.0, 1.0}, 0.05, "test");
  double largest = 0;
  for (int a = 0; a < 180; ++a)
    for (std::size_t i = 0; i < x.size(); ++i)
      largest = std::max(largest, std::abs(x[i] * std::cos(a * degree) + y[i] * std::sin(a * degree)));
  EXPECT_NEAR(spectrum.largest_pseudo_acceleration[0], largest, 1e-14 * largest);
  EXPECT_EQ(spectrum.displacement[0].largest, 0);
  EXPECT_DOUBLE_EQ(spectrum.largest_pseudo_acceleration[1], 4 * pi * pi * spectrum.displacement[1].largest);
  EXPECT_DOUBLE_EQ(spectrum.median_pseudo_acceleration[1], 4 * pi * pi * spectrum.displacement[1].median);
}

// The points left out raise no peak: thin, round, still and growing paths against all points at all angles.
TEST(Rotated, NothingIsMissedByTheEllipse) {
  const auto path = [](double width, double growth) {
    std::vector<std::array<double, 2>> points;
    for (int i = 0; i < 3000; ++i) {
      const double size = std::exp(growth * i) * std::sin(0.0031 * i), turn = 0.7 + 0.0004 * i;
      const double along = size * std::cos(0.37 * i), across = width * size * std::sin(0.29 * i);
      points.push_back(
          {along * std::cos(turn) - across * std::sin(turn), along * std::sin(turn) + across * std::cos(turn)});
    }
    return points;
  };
  for (const double width : {0.0, 1e-9, 0.01, 1.0})
    for (const double growth : {-0.002, 0.0, 0.002}) {
      RotationEnvelope envelope;
      std::array<double, 180> wanted{};
      for (const auto& [x, y] : path(width, growth)) {
        envelope.see(&x, &y, 1, 1);
        for (int a = 0; a < 180; ++a)
          wanted[a] = std::max(wanted[a], std::abs(x * directions()[a].cosine + y * directions()[a].sine));
      }
      for (int a = 0; a < 180; ++a) EXPECT_NEAR(envelope.peaks()[a], wanted[a], 1e-15) << a << " " << width;
    }
}

TEST(Rotated, RefusesComponentsThatDoNotMatch) {
  const Series x = wave(5, 7), shorter(x.begin(), x.end() - 1);
  const std::vector<double> periods{1};
  EXPECT_THROW(rotated_spectrum({x, step}, {shorter, step}, periods, 0.05, "test"), Error);
  EXPECT_THROW(rotated_spectrum({x, step}, {x, 2 * step}, periods, 0.05, "test"), Error);
  EXPECT_THROW(rotated_spectrum({x, step}, {x, step, step}, periods, 0.05, "test"), Error);
  EXPECT_THROW(rotated_spectrum({x, step}, {x, step}, periods, 1.5, "test"), Error);
}

}  // namespace
}  // namespace pilotis
