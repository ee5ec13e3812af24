// Butterworth filters against the magnitude that defines them, and the transform against its definition.
#include "core/motion/processing/butterworth.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <numbers>
#include <random>

#include "core/motion/fft.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;
constexpr double eps = std::numeric_limits<double>::epsilon();
constexpr double step = 0.01;

double warped(double frequency) { return std::tan(pi * frequency * step); }

// A pole at distance d from z = 1 is known to eps / d, relative eps / d^2, in each section.
double tolerance(int order, double corner) { return 2 * order * 4 * eps / std::pow(2 * pi * corner * step, 2); }

TEST(Butterworth, MagnitudeIsTheDefinition) {
  for (int order = 1; order <= 10; ++order)
    for (const double f : {0.03, 0.1, 0.5, 2.0, 10.0, 24.0, 40.0, 49.0}) {
      const double low = 0.1, high = 24;
      const double below = 1 / std::sqrt(1 + std::pow(warped(f) / warped(high), 2 * order));
      const double above = 1 / std::sqrt(1 + std::pow(warped(low) / warped(f), 2 * order));
      const double w = warped(f);
      const double transformed = (w * w - warped(low) * warped(high)) / (w * (warped(high) - warped(low)));
      const double band = 1 / std::sqrt(1 + std::pow(transformed, 2 * order));
      EXPECT_NEAR(filter_gain(butterworth_lowpass(order, high, step), f, step), below, tolerance(order, high)) << f;
      EXPECT_NEAR(filter_gain(butterworth_highpass(order, low, step), f, step), above, tolerance(order, low)) << f;
      EXPECT_NEAR(filter_gain(butterworth_bandpass(order, low, high, step), f, step), band, tolerance(order, low)) << f;
    }
}

TEST(Butterworth, EveryPoleIsInsideTheUnitCircle) {
  for (int order = 1; order <= 10; ++order)
    for (const FilterSection& q : butterworth_bandpass(order, 0.05, 30, 0.005)) {
      EXPECT_LT(std::abs(q.a2), 1);  // Jury's conditions for z^2 + a1 z + a2
      EXPECT_LT(std::abs(q.a1), 1 + q.a2);
    }
}

// The answer to a pulse at the middle of a long record is the same to the left and to the right.
TEST(Butterworth, BothWaysHasNoPhase) {
  const auto sections = butterworth_bandpass(4, 1.0, 20.0, step);
  std::vector<double> pulse(4001, 0.0);
  pulse[2000] = 1;
  filter_both_ways(sections, pulse);
  // The slowest pole of this filter decays as exp(-0.38 * 2 pi * 1 Hz * 20 s) = 1e-21 to the ends.
  for (std::size_t i = 1; i <= 2000; ++i) ASSERT_NEAR(pulse[2000 + i], pulse[2000 - i], tolerance(8, 1.0)) << i;
  const auto spectrum = fourier_transform(pulse);
  for (std::size_t k = 0; k < spectrum.size(); ++k) {
    const double gain = filter_gain(sections, static_cast<double>(k) / (4001 * step), step);
    ASSERT_NEAR(std::abs(spectrum[k]), gain * gain, 4001 * tolerance(8, 1.0)) << k;
  }
}

TEST(Fourier, TransformIsItsDefinition) {
  std::mt19937 random(7);
  for (const std::size_t size : {1, 2, 3, 4, 5, 7, 8, 30, 31, 64, 77}) {
    std::vector<double> x(size);
    for (double& value : x) value = static_cast<double>(random()) / 4294967296.0 - 0.5;
    const auto spectrum = fourier_transform(x);
    ASSERT_EQ(spectrum.size(), size / 2 + 1);
    for (std::size_t k = 0; k < spectrum.size(); ++k) {
      std::complex<double> sum = 0;
      for (std::size_t n = 0; n < size; ++n)
        sum += x[n] * std::polar(1.0, -2 * pi * static_cast<double>(k * n % size) / static_cast<double>(size));
      EXPECT_LT(std::abs(spectrum[k] - sum), 4 * eps * static_cast<double>(size)) << size << " " << k;
    }
    const auto back = inverse_fourier_transform(spectrum, size);
    for (std::size_t n = 0; n < size; ++n) EXPECT_NEAR(back[n], x[n], 4 * eps * static_cast<double>(size));
  }
}

// Parseval: sum x^2 = (1/N) sum |X|^2.
TEST(Fourier, EnergyIsTheSameOnBothSides) {
  for (const std::size_t size : {1000, 1024, 7999}) {
    std::mt19937 random(11);
    std::vector<double> x(size);
    double energy = 0;
    for (double& value : x) {
      value = static_cast<double>(random()) / 4294967296.0 - 0.5;
      energy += value * value;
    }
    const auto spectrum = fourier_transform(x);
    double sum = 0;
    for (std::size_t k = 0; k < spectrum.size(); ++k) sum += (k == 0 || 2 * k == size ? 1 : 2) * std::norm(spectrum[k]);
    EXPECT_NEAR(sum / static_cast<double>(size), energy, energy * eps * static_cast<double>(size));
  }
}

TEST(Fourier, FastSizesHaveSmallFactorsOnly) {
  EXPECT_EQ(fast_fourier_size(1), 1u);
  EXPECT_EQ(fast_fourier_size(7), 8u);
  EXPECT_EQ(fast_fourier_size(11), 12u);
  EXPECT_EQ(fast_fourier_size(1025), 1080u);  // 2^3 3^3 5
  EXPECT_EQ(fast_fourier_size(7999), 8000u);
}

}  // namespace
}  // namespace pilotis
