// Largest displacements with sign and time: a closed form, the spectra, and a peak after the ground has stopped.
#include "core/motion/spectra/signed_peaks.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>
#include <random>

#include "core/error.hpp"
#include "core/motion/spectra/response_spectrum.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;

// A suddenly applied constant acceleration A: u = -(A / omega^2)(1 + exp(-zeta pi / sqrt(1 - zeta^2))) at half a damped
// period (closed form). The time comes to a step of the march; there the extreme is missed by (omega_d h)^2 / 8.
TEST(SignedPeaks, OfASuddenConstant) {
  const std::vector<double> samples(1001, 2.0);
  const double zeta = 0.05;
  const std::vector<Oscillator> oscillators{{0.04, zeta}, {0.5, zeta}, {3, zeta}};
  const auto peaks = signed_peaks({samples, 0.01}, oscillators, "here");
  for (std::size_t i = 0; i < oscillators.size(); ++i) {
    const double omega = 2 * pi / oscillators[i].period, damped = omega * std::sqrt(1 - zeta * zeta);
    const double step = std::min(0.01, oscillators[i].period / 40);
    const double closed = 2 * (1 + std::exp(-zeta * pi / std::sqrt(1 - zeta * zeta)));
    EXPECT_LE(-omega * omega * peaks[i].displacement, closed * (1 + 1e-12));
    EXPECT_GE(-omega * omega * peaks[i].displacement, closed * (1 - std::pow(damped * step, 2) / 8));
    EXPECT_NEAR(peaks[i].time, pi / damped, step);
  }
}

// One triangle of area A dt over two steps is an impulse to an oscillator a thousand times slower: u = -(A dt / omega)
// sin(omega t), largest a quarter period later, long after the ground has stopped. The triangle's width moves both by
// (omega dt)^2 / 6 and less.
TEST(SignedPeaks, AfterTheGroundHasStopped) {
  const std::vector<double> samples{0, 3, 0};
  const double period = 10, omega = 2 * pi / period;
  for (const double sign : {1.0, -1.0}) {
    const std::vector<double> signed_samples{0, 3 * sign, 0};
    const auto peak = signed_peaks({signed_samples, 0.01}, std::vector<Oscillator>{{period, 0.0}}, "here").front();
    EXPECT_NEAR(peak.displacement, -sign * 0.03 / omega, 0.03 / omega * std::pow(omega * 0.01, 2));
    EXPECT_NEAR(peak.time, 0.01 + period / 4, 1e-4);
  }
}

// Random grounds: the magnitude has the bits of the spectrum, on every instruction set.
TEST(SignedPeaks, MagnitudesAreThoseOfTheSpectrum) {
  std::mt19937 random(5);
  std::normal_distribution<double> normal;
  std::vector<double> samples(1500);
  for (double& sample : samples) sample = normal(random);
  std::vector<Oscillator> oscillators = oscillators_of(period_grid(0.02, 20, 37, "here"), std::vector<double>{0, 0.05});
  for (const double first : {0.0, 0.01}) {
    const Ground ground{samples, 0.01, first};
    std::vector<OscillatorExtremes> extremes(oscillators.size());
    oscillator_extremes(ground, oscillators, {}, extremes, "here");
    for (const InstructionSet set : {InstructionSet::baseline, chosen_instruction_set()}) {
      const auto peaks = signed_peaks(ground, oscillators, "here", {}, set);
      for (std::size_t i = 0; i < oscillators.size(); ++i)
        EXPECT_EQ(std::abs(peaks[i].displacement), extremes[i].displacement.largest()) << oscillators[i].period;
    }
  }
}

TEST(SignedPeaks, RefusesTheRigidOscillator) {
  const std::vector<double> samples{0, 1};
  EXPECT_THROW(signed_peaks({samples, 0.01}, std::vector<Oscillator>{{0, 0.05}}, "here"), Error);
}

}  // namespace
}  // namespace pilotis
