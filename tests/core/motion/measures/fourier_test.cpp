#include "core/motion/measures/fourier.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/measures/spectral.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;
constexpr double eps = std::numeric_limits<double>::epsilon();

// exp(-(t - 5)^2 / (2 s^2)) has |F| = s sqrt(2 pi) exp(-(2 pi f s)^2 / 2); the sum over samples is the integral to
// rounding, as the spectrum is nothing at the sampling frequency and the bell nothing at the ends (exp(-312)).
TEST(FourierAmplitudes, ABellInMetersPerSecond) {
  constexpr double s = 0.2;
  Accelerogram record{0.01, 0, {}};
  for (int i = 0; i <= 1000; ++i) record.samples.push_back(std::exp(-std::pow((i * 0.01 - 5) / s, 2) / 2));
  const FourierAmplitudes spectrum = fourier_amplitudes(record, 0.05);
  EXPECT_EQ(spectrum.frequencies[0], 0);
  EXPECT_LE(spectrum.frequencies[1], 0.05 * (1 + eps));
  EXPECT_NEAR(spectrum.frequencies.back(), 50, 1e-9);
  for (std::size_t i = 0; i < spectrum.frequencies.size(); ++i) {
    const double exponent = std::pow(2 * pi * spectrum.frequencies[i] * s, 2) / 2;
    ASSERT_NEAR(spectrum.amplitudes[i], s * std::sqrt(2 * pi) * std::exp(-exponent), 1000 * eps);
  }
}

// Parseval with zeros behind: step sum a^2 = 2 df sum |F|^2 (the ends once).
TEST(FourierAmplitudes, KeepTheEnergy) {
  Accelerogram record{0.02, 0, {}};
  double energy = 0;
  for (int i = 0; i < 777; ++i) {
    record.samples.push_back(std::sin(i * i * 0.01));
    energy += 0.02 * record.samples.back() * record.samples.back();
  }
  const FourierAmplitudes spectrum = fourier_amplitudes(record, 0.05);
  const double spacing = spectrum.frequencies[1];
  const auto size = std::lround(1 / (spacing * 0.02));
  double sum = 0;
  for (std::size_t i = 0; i < spectrum.amplitudes.size(); ++i) {
    const bool once = i == 0 || 2 * static_cast<long>(i) == size;
    sum += (once ? 1 : 2) * spacing * spectrum.amplitudes[i] * spectrum.amplitudes[i];
  }
  EXPECT_NEAR(sum, energy, energy * 1000 * eps);
}

TEST(KonnoOhmachi, KeepsAConstantAndSpreadsALine) {
  FourierAmplitudes flat, line;
  for (int i = 0; i <= 200; ++i) {
    flat.frequencies.push_back(0.1 * i);
    flat.amplitudes.push_back(3);
    line.frequencies.push_back(0.1 * i);
    line.amplitudes.push_back(i == 50 ? 1 : 0);
  }
  for (const double value : smoothed(flat, 40).amplitudes) EXPECT_NEAR(value, 3, 200 * 3 * eps);
  const auto spread = smoothed(line, 20).amplitudes;
  // At f = 5.5 Hz the weight of 5 Hz is (sin x / x)^4, x = 20 log10(5 / 5.5), over the sum of all there.
  double sum = 0;
  const auto weight = [](double f, double center) {
    const double x = 20 * std::log10(f / center);
    return x == 0 ? 1 : std::pow(std::sin(x) / x, 4);
  };
  for (int i = 1; i <= 200; ++i) sum += weight(0.1 * i, 5.5);
  EXPECT_NEAR(spread[55], weight(5, 5.5) / sum, 1e-12);
  EXPECT_EQ(spread[0], 0);
}

// A wave of 2 Hz in a wide bell: the spectrum is a narrow bell (deviation 1/(2 pi 10 s) = 0.016 Hz) around 2 Hz, for
// which the mean of 1/f is 0.5 s (1 + (0.016 / sqrt(2) / 2)^2).
TEST(MeanPeriod, OfANarrowBandIsItsPeriod) {
  Accelerogram record{0.01, 0, {}};
  for (int i = 0; i <= 16000; ++i)
    record.samples.push_back(std::exp(-std::pow((i * 0.01 - 80) / 10, 2) / 2) * std::sin(2 * pi * 2 * i * 0.01));
  const double spread = std::pow(1 / (2 * pi * 10) / std::numbers::sqrt2 / 2, 2);
  EXPECT_NEAR(mean_period(record), 0.5 * (1 + spread), 0.5 * 10 * spread * spread);
}

// Pseudo-velocity c T: integral c (2.5^2 - 0.1^2) / 2, to which the trapezoidal rule is exact.
TEST(Housner, IntegratesTheStatedPeriods) {
  const PseudoVelocities line = [](std::span<const double> periods) {
    std::vector<double> values;
    for (const double period : periods) values.push_back(0.4 * period);
    return values;
  };
  EXPECT_NEAR(housner_intensity(line), 0.4 * (6.25 - 0.01) / 2, 250 * eps);
  const std::vector<double> periods{0.05, 0.3, 1, 2, 4}, values{0.02, 0.12, 0.4, 0.8, 1.6};
  EXPECT_NEAR(housner_intensity(periods, values, "table"), 0.4 * (6.25 - 0.01) / 2, 250 * eps);
  EXPECT_THROW(housner_intensity(std::vector{0.2, 3.0}, std::vector{1.0, 1.0}, "table"), Error);
  EXPECT_THROW(housner_intensity(std::vector{0.1, 2.0}, std::vector{1.0, 1.0}, "table"), Error);
  EXPECT_THROW(housner_intensity({}, {}, "table"), Error);
}

TEST(PredominantPeriod, IsWhereTheAccelerationIsLargest) {
  EXPECT_EQ(predominant_period(std::vector{0.1, 0.2, 0.3}, std::vector{1.0, 5.0, 2.0}), 0.2);
  // SA = 2 pi / T * PSV with PSV = T^2 exp(-T / 0.4): largest at T = 0.4 s; the periods asked for lie 1.25 % apart.
  const PseudoVelocities hump = [](std::span<const double> periods) {
    std::vector<double> values;
    for (const double period : periods) values.push_back(period * period * std::exp(-period / 0.4));
    return values;
  };
  EXPECT_NEAR(predominant_period(hump), 0.4, 0.4 * 0.00626);
}

}  // namespace
}  // namespace pilotis
