// An oscillator has the same bits whatever its lane, its company, the threads and the instruction set.
#include <gtest/gtest.h>

#include <cmath>
#include <cstring>
#include <random>
#include <thread>

#include "core/motion/spectra/bundles.hpp"
#include "core/motion/spectra/response_spectrum.hpp"
#include "core/motion/spectra/spectra_kernels.hpp"

namespace pilotis {
namespace {

// Invented: two waves that beat, dying away.
std::vector<double> wave(int count) {
  std::vector<double> samples;
  for (int i = 0; i < count; ++i)
    samples.push_back(std::exp(-0.001 * i) * (std::sin(0.11 * i) + 0.7 * std::sin(0.13 * i + 1)));
  return samples;
}

constexpr double step = 0.01;

std::vector<OscillatorExtremes> seen(std::span<const double> samples, std::span<const Oscillator> oscillators,
                                     InstructionSet set) {
  std::vector<OscillatorExtremes> extremes(oscillators.size());
  oscillator_extremes({samples, step}, oscillators, {}, extremes, "test", set);
  return extremes;
}

bool same_bits(const OscillatorExtremes& a, const OscillatorExtremes& b) { return std::memcmp(&a, &b, sizeof a) == 0; }

// Straddles the widths of 2, 4 and 8 and the pairs of packs; periods with several subdivisions of the step among them.
class Company : public ::testing::TestWithParam<int> {};

TEST_P(Company, ChangesNoBit) {
  const std::vector<double> samples = wave(1500);  // several blocks, the last one cut
  std::vector<Oscillator> oscillators;
  for (int i = 0; i < GetParam(); ++i) oscillators.push_back({0.05 * std::pow(1.17, i), 0.01 * (i % 7)});
  const auto alone = [&](const Oscillator& o) { return seen(samples, {&o, 1}, InstructionSet::baseline)[0]; };
  for (const InstructionSet set : instruction_sets()) {
    const auto together = seen(samples, oscillators, set);
    for (std::size_t i = 0; i < oscillators.size(); ++i)
      EXPECT_TRUE(same_bits(together[i], alone(oscillators[i]))) << name_of(set) << " " << i;
  }
}
INSTANTIATE_TEST_SUITE_P(Counts, Company, ::testing::Values(1, 2, 3, 4, 5, 7, 8, 9, 15, 16, 17, 31, 33));

TEST(Company, AnyOrderAndAnyThread) {
  const std::vector<double> samples = wave(700);
  std::vector<Oscillator> forward;
  for (int i = 0; i < 37; ++i) forward.push_back({0.02 * std::pow(1.2, i), 0.05});
  const std::vector<Oscillator> backward(forward.rbegin(), forward.rend());
  const auto wanted = seen(samples, forward, chosen_instruction_set());
  std::vector<OscillatorExtremes> found[2];
  std::thread one([&] { found[0] = seen(samples, backward, chosen_instruction_set()); });
  std::thread two([&] { found[1] = seen(samples, backward, chosen_instruction_set()); });
  one.join();
  two.join();
  for (const auto& of_a_thread : found)
    for (std::size_t i = 0; i < forward.size(); ++i)
      EXPECT_TRUE(same_bits(of_a_thread[forward.size() - 1 - i], wanted[i])) << i;
}

// What the kernel computes, written out without lanes, packs or blocks.
TEST(Kernel, IsThePlainRecurrence) {
  const std::vector<double> samples = wave(1500);
  const Oscillator oscillator{0.9, 0.05};  // no subdivision
  const double w = 2 * M_PI / oscillator.period, z = oscillator.damping_ratio, wd = w * std::sqrt(1 - z * z);
  // Duhamel's integral by its exact recurrence in complex form, an independent derivation:
  // q' = -(z w - i wd) q - a_g, u = Im q / wd.
  double low = 0, high = 0, re = 0, im = 0;
  const int finer = 40;
  for (std::size_t i = 0; i < samples.size(); ++i)
    for (int j = 0; j < finer; ++j) {
      const double to = i + 1 < samples.size() ? samples[i + 1] : 0;
      const double mid = samples[i] + (to - samples[i]) * (j + 0.5) / finer, h = step / finer;
      const double half = std::exp(-z * w * h / 2), c = std::cos(wd * h / 2) * half, s = std::sin(wd * h / 2) * half;
      for (int k = 0; k < 2; ++k) {  // half a step, the impulse of the middle, half a step
        const double turned = c * re - s * im;
        im = s * re + c * im;
        re = turned;
        if (k == 0) re -= mid * h;
      }
      if (j + 1 < finer) continue;
      low = std::min(low, im / wd);
      high = std::max(high, im / wd);
    }
  const OscillatorExtremes found = seen(samples, {&oscillator, 1}, chosen_instruction_set())[0];
  // The rule of the middle errs by (w h)^2 / 24, h = step / 40: 1e-7.
  EXPECT_NEAR(found.displacement.low, low, 1e-6 * high);
  EXPECT_NEAR(found.displacement.high, high, 1e-6 * high);
}

// White noise of two-sided density S0 per rad/s: displacement variance pi S0 / (2 zeta omega^3) (PUBLISHED E: Crandall
// & Mark 1963). Independent samples of variance 1, linear between them, have S0 = step / (2 pi) at periods far above
// the step. The mean of u^2 over a duration D has the relative standard error 1 / sqrt(zeta omega D): four of them, and
// 0.2 % for the polygon's own roll-off, (omega step)^2 / 6 = 0.07 %, and the start.
TEST(Kernel, VarianceUnderWhiteNoise) {
  const std::vector<Oscillator> eight(8, Oscillator{1, 0.05});
  const std::vector<int> members{0, 1, 2, 3, 4, 5, 6, 7};
  OscillatorBundle bundle = bundles_at_rest(eight, members, step)[0];
  constexpr int block = 1000, blocks = 4000;
  std::vector<double> ground(block + 1, 0.0), u(block * OscillatorBundle::lanes);
  std::mt19937_64 random(20261201);
  std::normal_distribution<double> normal;
  double sum = 0;
  for (int b = 0; b < blocks; ++b) {
    ground[0] = ground[block];
    for (int i = 1; i <= block; ++i) ground[i] = normal(random);
    baseline::march_displacements(ground.data(), block, bundle, u.data());
    for (int i = 0; i < block; ++i) sum += u[i * OscillatorBundle::lanes] * u[i * OscillatorBundle::lanes];
  }
  const double zeta = 0.05, omega = 2 * M_PI, s0 = step / (2 * M_PI),
               wanted = M_PI * s0 / (2 * zeta * std::pow(omega, 3));
  const double error = 1 / std::sqrt(zeta * omega * block * blocks * step);
  EXPECT_NEAR(sum / (block * blocks), wanted, (4 * error + 0.002) * wanted);
}

}  // namespace
}  // namespace pilotis
