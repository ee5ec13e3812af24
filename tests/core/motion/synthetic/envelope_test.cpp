// Envelopes against their closed forms. Simpson's rule with 200,000 intervals is exact to about 1e-9 here.
#include "core/motion/synthetic/envelope.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "core/error.hpp"
#include "tests/core/motion/synthetic/made.hpp"

namespace pilotis {
namespace {

template <class Function>
double integral(Function f, double from, double to) {
  constexpr int intervals = 200000;
  const double h = (to - from) / intervals;
  double sum = 0;
  for (int i = 0; i <= intervals; ++i) sum += (i == 0 || i == intervals ? 1 : i % 2 == 1 ? 4 : 2) * f(from + i * h);
  return sum * h / 3;
}

TEST(Envelope, RisesStaysAndDecays) {
  const JenningsEnvelope envelope{2, 10, 4};
  EXPECT_EQ(envelope.at(0), 0);
  EXPECT_EQ(envelope.at(1), 0.25);
  EXPECT_EQ(envelope.at(2), 1);
  EXPECT_EQ(envelope.at(7), 1);
  EXPECT_EQ(envelope.at(10), 1);
  EXPECT_DOUBLE_EQ(envelope.at(14), std::exp(-1.0));
  EXPECT_DOUBLE_EQ(envelope.at(18), std::exp(-2.0));
}

// To t = 60 s: t1 / 5 + t2 - t1 + t_decay / 2, less exp(-2 * 50 / 4) = 1e-11 of the last.
TEST(Envelope, IntegralOfTheSquareOfJennings) {
  const JenningsEnvelope envelope{2, 10, 4};
  EXPECT_NEAR(integral([&](double t) { return std::pow(envelope.at(t), 2); }, 0, 60), 2.0 / 5 + 8 + 2, 1e-6);
}

struct Window {
  double length, epsilon, eta;
};
class SaragoniHart : public testing::TestWithParam<Window> {};

// Boore 2003: 1 at epsilon t_eta, its peak; eta at t_eta.
TEST_P(SaragoniHart, PeaksWhereStated) {
  const auto [length, epsilon, eta] = GetParam();
  const SaragoniHartEnvelope envelope(length, epsilon, eta);
  const double peak = epsilon * length;
  EXPECT_NEAR(envelope.at(peak), 1, 1e-12);
  EXPECT_LT(envelope.at(0.99 * peak), 1);
  EXPECT_LT(envelope.at(1.01 * peak), 1);
  EXPECT_NEAR(envelope.at(length), eta, 1e-12);
  EXPECT_EQ(envelope.at(0), 0);
}

// The gamma function: integral of x^(2b) exp(-2 c x) is Gamma(2b + 1) / (2c)^(2b + 1).
TEST_P(SaragoniHart, IntegralOfTheSquare) {
  const auto [length, epsilon, eta] = GetParam();
  const SaragoniHartEnvelope envelope(length, epsilon, eta);
  const double power = 2 * envelope.b() + 1;
  const double closed = length * std::pow(envelope.a(), 2) * std::tgamma(power) / std::pow(2 * envelope.c(), power);
  EXPECT_NEAR(integral([&](double t) { return std::pow(envelope.at(t), 2); }, 0, 20 * length), closed, 1e-5 * closed);
}

INSTANTIATE_TEST_SUITE_P(Windows, SaragoniHart,
                         testing::Values(Window{20, 0.2, 0.05}, Window{8, 0.3, 0.1}, Window{12, 0.4, 0.2}));

TEST(Envelope, RefusesWhatDoesNotReachItsTop) {
  const auto window = [](double length) {
    return made("kanai_tajimi", {{"envelope", 1}, {"window_time", length}, {"peak_fraction", 0.5}});
  };
  EXPECT_NO_THROW(window(40));
  EXPECT_THROW(window(41), Error);
}

// A motion under the window: the mean square at the peak against that at the end of the window is 1 / eta^2.
TEST(Envelope, IsThatOfTheParameter) {
  double strong = 0, weak = 0;
  for (std::uint64_t seed = 1; seed <= 50; ++seed) {
    const auto samples =
        made("kanai_tajimi", {{"envelope", 1}, {"window_time", 15}, {"noise_density", 0.01}}, {seed, 0.01, 20})
            .record.samples;
    for (std::size_t i = 0; i < 100; ++i) {
      strong += std::pow(samples[250 + i], 2);
      weak += std::pow(samples[1450 + i], 2);
    }
  }
  const SaragoniHartEnvelope form(15, 0.2, 0.05);
  const auto square = [&](double t) { return std::pow(form.at(t), 2); };
  const double expected = integral(square, 14.5, 15.5) / integral(square, 2.5, 3.5);
  // Each sum is over 50 seconds of noise of about 8 independent values a second: 400, so sqrt(2 / 400) = 7 % each and
  // 10 % for the ratio; three of them.
  EXPECT_NEAR(weak / strong, expected, 0.3 * expected);
}

}  // namespace
}  // namespace pilotis
