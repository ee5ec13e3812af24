// The point source against the formulas of Boore 2003 and Brune 1970, and the motions against the point source.
#include "core/motion/synthetic/stochastic.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <complex>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/synthetic/envelope.hpp"
#include "tests/core/motion/synthetic/estimate.hpp"
#include "tests/core/motion/synthetic/made.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;

// Without path and site: what stands is the source.
PointSource bare_source(double magnitude = 6, double stress_drop = 1e7) {
  PointSource source;
  source.magnitude = magnitude;
  source.stress_drop = stress_drop;
  source.distance = 1000;
  source.density = 2800;
  source.shear_velocity = 3800;
  source.spreading = {1, 0, 0.5};
  source.hinge_distance = {7e4, 1.3e5};
  source.quality = 1e30;
  source.quality_velocity = 3800;
  return source;
}

// Hanks & Kanamori 1979: log10 M0 (dyne cm) = 1.5 M + 16.05, so M 6 is 1.122e25 dyne cm.
TEST(PointSource, MomentInNewtonMeters) {
  EXPECT_NEAR(bare_source(6).moment(), std::pow(10, 25.05) * 1e-7, 1e-12 * 1.1e18);
  EXPECT_NEAR(bare_source(7).moment() / bare_source(5).moment(), 1000, 1e-9);
}

// By hand: M 6, 100 bar, 3.8 km/s: 4.9e6 * 3.8 * (100 / 10^25.05)^(1/3) = 0.38605 Hz.
TEST(PointSource, CornerFrequencyOfBoore) {
  EXPECT_NEAR(bare_source().corner_frequency(), 4.9e6 * 3.8 * std::cbrt(100 / std::pow(10, 25.05)), 1e-12);
  EXPECT_NEAR(bare_source().corner_frequency(), 0.38605, 5e-6);
}

// Brune 1970: f_c = 2.34 beta / (2 pi r), r = (7 M0 / (16 stress drop))^(1/3), all SI. Boore's 4.9e6 has two figures: 1
// %.
TEST(PointSource, CornerFrequencyOfBrune) {
  for (double magnitude : {4.0, 6.0, 7.5}) {
    const PointSource source = bare_source(magnitude, 5e6);
    const double radius = std::cbrt(7 * source.moment() / (16 * 5e6));
    const double brune = 2.34 * 3800 / (2 * pi * radius);
    EXPECT_NEAR(source.corner_frequency(), brune, 0.05 / 4.9 * brune);
  }
}

// Boore's C in his own units: 0.55 * 0.71 * 2 / (4 pi * 2.8 * 3.8^3 * 1) * 1e-20 with M0 in dyne cm gives cm s. V is
// printed with two figures (0.71): 0.5 %.
TEST(PointSource, SourceSpectrumInTheUnitsOfThePaper) {
  const double c = 0.55 * 0.71 * 2 / (4 * pi * 2.8 * std::pow(3.8, 3)) * 1e-20;
  const double displacement_cm_s = c * std::pow(10, 25.05);
  EXPECT_NEAR(bare_source().source_spectrum(0) * 100, displacement_cm_s, 0.005 / 0.71 * displacement_cm_s);
}

// Omega-squared: half the long-period level at f_a; of acceleration, C M0 (2 pi f_a)^2 at high frequencies, to
// (f_a / f)^2. That level goes with M0^(1/3) stress_drop^(2/3).
TEST(PointSource, CornerAndHighFrequencyLevel) {
  const PointSource source = bare_source();
  const double corner = source.corner_frequency();
  EXPECT_NEAR(source.source_spectrum(corner) / source.source_spectrum(0), 0.5, 1e-12);
  const double level = source.source_spectrum(0) * std::pow(2 * pi * corner, 2);
  EXPECT_NEAR(source.amplitude_spectrum(1000 * corner), level, 2e-6 * level);
  EXPECT_NEAR(bare_source(6, 8e7).amplitude_spectrum(1e4) / source.amplitude_spectrum(1e4), 4, 1e-5);
  EXPECT_NEAR(bare_source(8).amplitude_spectrum(1e4) / source.amplitude_spectrum(1e4), 10, 1e-4);
  EXPECT_EQ(source.amplitude_spectrum(0), 0);
}

// 1/R to 70 km, flat to 130 km, then 1/sqrt(R), from 1 at 1 km.
TEST(PointSource, SpreadingInThreePieces) {
  PointSource source = bare_source();
  const auto at = [&](double distance) {
    source.distance = distance;
    return source.spreading_factor();
  };
  EXPECT_DOUBLE_EQ(at(1e3), 1);
  EXPECT_DOUBLE_EQ(at(2e4), 1.0 / 20);
  EXPECT_DOUBLE_EQ(at(1e5), 1.0 / 70);
  EXPECT_NEAR(at(5.2e5), 1.0 / 70 / 2, 1e-15);
}

TEST(PointSource, PathAndSiteMultiply) {
  const double plain = bare_source().amplitude_spectrum(8);
  PointSource source = bare_source();
  source.kappa = 0.04;
  EXPECT_NEAR(source.amplitude_spectrum(8) / plain, std::exp(-pi * 0.04 * 8), 1e-12);
  source = bare_source();
  source.f_max = 8;
  EXPECT_NEAR(source.amplitude_spectrum(8) / plain, 1 / std::sqrt(2), 1e-12);
  source = bare_source();
  source.distance = 50e3;
  source.quality = 680;
  source.quality_exponent = 0.36;
  EXPECT_NEAR(source.amplitude_spectrum(8) / plain, std::exp(-pi * 8 * 50e3 / (680 * std::pow(8, 0.36) * 3800)) / 50,
              1e-12);
  source = bare_source();
  source.site = {{2, 32}, {1, 4}};  // at 8 Hz, midway in the logarithm: 2
  EXPECT_NEAR(source.amplitude_spectrum(8) / plain, 2, 1e-12);
  source.site = {{10, 32}, {3, 4}};
  EXPECT_NEAR(source.amplitude_spectrum(8) / plain, 3, 1e-12);
}

// The mean square of dt |X(f)| over seeds is A(f)^2. 1000 seeds: each |X|^2 scatters by 100 %, a standard error of 3.2
// %. Dividing each motion by its own root of the mean square over 2048 frequencies changes the mean by less than 1 /
// 2048.
TEST(Stochastic, SuiteHasTheSpectrumOfThePointSource) {
  PointSource source = bare_source();
  source.distance = 2e4;
  source.kappa = 0.03;
  const double step = 0.01;
  const SaragoniHartEnvelope form(15, 0.2, 0.05);
  std::vector<double> window(4096, 0.0);
  for (std::size_t i = 1; i < 2048; ++i) window[i] = form.at(static_cast<double>(i) * step);
  for (int k : {10, 41, 205, 410, 1000}) {
    const double frequency = k / (4096 * step);
    const Estimate square = over_seeds(1000, [&](std::uint64_t seed) {
      const std::vector<double> motion = shaped_noise(source, window, step, seed);
      std::complex<double> sum = 0;
      for (std::size_t i = 0; i < motion.size(); ++i)
        sum += motion[i] * std::polar(1.0, -2 * pi * static_cast<double>(k * i % 4096) / 4096);
      return std::norm(sum * step);
    });
    const double expected = std::pow(source.amplitude_spectrum(frequency), 2);
    expect_agrees(square, expected, expected, std::to_string(frequency) + " Hz", 0.2);
  }
}

TEST(Stochastic, ScalesWithItsSourceAndSaysWhatItDerived) {
  const std::map<std::string, double> near{{"magnitude", 6}, {"distance", 2e4}};
  const MadeMotion motion = made("stochastic", near, {3, 0.01, 30});
  EXPECT_NE(motion.notes.at(0).find("corner frequency 0.3861 Hz"), std::string::npos) << motion.notes[0];
  EXPECT_GT(std::abs(peak_of(motion.record).value),
            std::abs(peak_of(made("stochastic", {{"magnitude", 6}, {"distance", 6e4}}, {3, 0.01, 30}).record).value));
}

TEST(Stochastic, RefusesWhatDoesNotGoTogether) {
  const auto where = [](const std::map<std::string, double>& given, const SyntheticGrid& grid) {
    try {
      made("stochastic", given, grid);
    } catch (const Error& e) {
      return e.where();
    }
    return std::string();
  };
  EXPECT_EQ(where({{"magnitude", 7.5}, {"distance", 2e4}}, {1, 0.01, 20}), "here.duration");
  EXPECT_EQ(where({{"magnitude", 5}, {"distance", 2e4}, {"hinge_1", 8e4}, {"hinge_2", 7e4}}, {1, 0.01, 20}),
            "here.hinge_2");
  EXPECT_EQ(where({{"source_duration", 0}, {"path_duration", 0}}, {1, 0.01, 20}), "here.window_factor");
  EXPECT_EQ(where({{"magnitude", 5}, {"distance", 2e4}}, {1, 0.01, 20}), "");
}

}  // namespace
}  // namespace pilotis
