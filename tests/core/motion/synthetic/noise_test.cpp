// Noise against the closed forms of its model; how far statistical checks reach: estimate.hpp.
#include <gtest/gtest.h>

#include <Eigen/Dense>
#include <cmath>
#include <complex>
#include <numbers>
#include <unsupported/Eigen/MatrixFunctions>

#include "core/error.hpp"
#include "core/motion/synthetic/baseline.hpp"
#include "core/motion/synthetic/filtered_noise.hpp"
#include "core/motion/synthetic/random.hpp"
#include "tests/core/motion/synthetic/estimate.hpp"
#include "tests/core/motion/synthetic/made.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;

// Mean of f(t) f(t + lag).
double lagged_product(const std::vector<double>& f, std::size_t lag) {
  double sum = 0;
  for (std::size_t i = 0; i + lag < f.size(); ++i) sum += f[i] * f[i + lag];
  return sum / static_cast<double>(f.size() - lag);
}

std::vector<double> ground_noise(double period, double damping, double density, double step, std::size_t count,
                                 std::uint64_t seed) {
  return filtered_noise(kanai_tajimi_filter(2 * pi / period, damping, density, step), count, seed);
}

double closed_variance(double omega, double zeta) { return pi * omega * (1 + 4 * zeta * zeta) / (2 * zeta); }

// Integral of the Kanai-Tajimi density (S0 = 1) times cos(omega tau) over all frequencies, by Simpson's rule up to
// 3000 omega_g; what is left out is below 4 zeta^2 omega_g^2 / (tau (3000 omega_g)^2), nothing beside the variance.
double covariance(double omega_g, double zeta, double tau) {
  constexpr int intervals = 600000;
  const double h = 3000 * omega_g / intervals;
  double sum = 0;
  for (int i = 0; i <= intervals; ++i) {
    const double r = i * h / omega_g;
    const double damping = 4 * zeta * zeta * r * r;
    const double density = (1 + damping) / ((1 - r * r) * (1 - r * r) + damping);
    sum += (i == 0 || i == intervals ? 1 : i % 2 == 1 ? 4 : 2) * density * std::cos(i * h * tau);
  }
  return 2 * sum * h / 3;
}

struct Ground {
  double period, damping, step;
};
constexpr Ground grounds[] = {{0.4, 0.6, 0.01}, {0.4, 0.6, 0.04}, {1.2, 0.3, 0.02}, {0.25, 0.9, 0.005}};

TEST(KanaiTajimi, VarianceIsTheClosedFormAtAnyStep) {
  for (const Ground& ground : grounds) {
    const Estimate variance = over_seeds(200, [&](std::uint64_t seed) {
      return lagged_product(ground_noise(ground.period, ground.damping, 1, ground.step, 4000, seed), 0);
    });
    const double expected = closed_variance(2 * pi / ground.period, ground.damping);
    expect_agrees(variance, expected, expected, "T_g " + std::to_string(ground.period));
  }
}

TEST(KanaiTajimi, CovarianceIsTheTransformOfTheDensity) {
  const Ground ground = grounds[0];
  const double omega = 2 * pi / ground.period;
  ASSERT_NEAR(covariance(omega, ground.damping, 0), closed_variance(omega, ground.damping),
              1e-3 * closed_variance(omega, ground.damping));
  for (std::size_t lag : {1u, 5u, 10u, 20u, 40u}) {
    const Estimate product = over_seeds(200, [&](std::uint64_t seed) {
      return lagged_product(ground_noise(ground.period, ground.damping, 1, ground.step, 4000, seed), lag);
    });
    expect_agrees(product, covariance(omega, ground.damping, static_cast<double>(lag) * ground.step),
                  closed_variance(omega, ground.damping), "lag " + std::to_string(lag));
  }
}

TEST(KanaiTajimi, IsStationaryFromTheFirstSample) {
  const double expected = closed_variance(2 * pi / 0.4, 0.6);
  const Estimate first = over_seeds(20000, [&](std::uint64_t seed) {
    const double f = ground_noise(0.4, 0.6, 1, 0.01, 1, seed)[0];
    return f * f;
  });
  expect_agrees(first, expected, expected, "first sample");
}

TEST(KanaiTajimi, DensityScalesTheVariance) {
  const double one = lagged_product(ground_noise(0.4, 0.6, 1, 0.01, 1000, 3), 0);
  EXPECT_NEAR(lagged_product(ground_noise(0.4, 0.6, 2.5, 0.01, 1000, 3), 0), 2.5 * one, 1e-12 * one);
}

double kanai_tajimi_density(double omega, double omega_g, double zeta_g) {
  const double r = omega / omega_g, damping = 4 * zeta_g * zeta_g * r * r;
  return (1 + damping) / ((1 - r * r) * (1 - r * r) + damping);
}

double clough_penzien_density(double omega, double omega_g, double zeta_g, double omega_f, double zeta_f) {
  const double r = omega / omega_f;
  return kanai_tajimi_density(omega, omega_g, zeta_g) * std::pow(r, 4) /
         ((1 - r * r) * (1 - r * r) + 4 * zeta_f * zeta_f * r * r);
}

// Estimates the two-sided density per rad/s at omega as dt |X|^2 / (2 pi N), X the transform of N samples under a Hann
// window of mean square 1. Its expectation is the density smoothed by the window's own transform.
class Periodogram {
 public:
  Periodogram(double omega, double step, std::size_t count) : omega_(omega), step_(step), wave_(count) {
    for (std::size_t i = 0; i < count; ++i)
      wave_[i] = window(i) * std::polar(1.0, -omega * step * static_cast<double>(i));
  }

  double operator()(const std::vector<double>& f) const {
    std::complex<double> sum = 0;
    for (std::size_t i = 0; i < f.size(); ++i) sum += wave_[i] * f[i];
    return scale() * std::norm(sum);
  }

  // Integral of density times the window's transform over eight bins to each side; beyond is less than 1e-4 of it.
  template <class Density>
  double expectation(Density density) const {
    const double bin = 2 * pi / (step_ * static_cast<double>(wave_.size()));
    constexpr int points = 16, bins = 8;
    double sum = 0;
    for (int k = -bins * points; k <= bins * points; ++k) {
      const double away = bin * k / points;
      std::complex<double> transform = 0;
      for (std::size_t i = 0; i < wave_.size(); ++i)
        transform += window(i) * std::polar(1.0, -away * step_ * static_cast<double>(i));
      sum += scale() * std::norm(transform) * density(std::abs(omega_ + away)) * bin / points;
    }
    return sum;
  }

 private:
  double window(std::size_t i) const {
    return std::sqrt(8.0 / 3.0) *
           std::pow(std::sin(pi * static_cast<double>(i) / static_cast<double>(wave_.size())), 2);
  }
  double scale() const { return step_ / (2 * pi * static_cast<double>(wave_.size())); }

  double omega_, step_;
  std::vector<std::complex<double>> wave_;
};

// Samples alias: what lies at omega + 2 pi n / dt is seen at omega. Six images each side are added up; those beyond
// are below 4 zeta_g^2 (omega_g dt / (2 pi))^2 (2 / 6.5) = 3e-4 here.
template <class Density>
double aliased(Density density, double omega, double step) {
  double sum = 0;
  for (int n = -6; n <= 6; ++n) sum += density(std::abs(omega + 2 * pi * n / step));
  return sum;
}

// A periodogram of one seed scatters by 100 %: 2000 seeds leave a standard error of 2.2 %, four of them 9 %.
template <int N, class Density>
void expect_density(const NoiseFilter<N>& filter, double step, const std::vector<double>& omegas, Density density) {
  for (double omega : omegas) {
    const Periodogram periodogram(omega, step, 2048);
    const Estimate estimate =
        over_seeds(2000, [&](std::uint64_t seed) { return periodogram(filtered_noise(filter, 2048, seed)); });
    const double expected = periodogram.expectation([&](double w) { return aliased(density, w, step); });
    expect_agrees(estimate, expected, expected, "omega " + std::to_string(omega), 0.12);
  }
}

TEST(CloughPenzien, SuiteHasTheStatedDensity) {
  expect_density(clough_penzien_filter(15, 0.6, 1.5, 0.5, 1, 0.01), 0.01, {1, 1.5, 3, 8, 15, 30, 60},
                 [](double omega) { return clough_penzien_density(omega, 15, 0.6, 1.5, 0.5); });
}

TEST(KanaiTajimi, SuiteHasTheStatedDensity) {
  expect_density(kanai_tajimi_filter(15, 0.6, 1, 0.01), 0.01, {5, 15, 30, 60},
                 [](double omega) { return kanai_tajimi_density(omega, 15, 0.6); });
}

// Variance = integral of the density over all frequencies: Simpson's rule to 3000 omega_g, beyond which
// 8 zeta_g^2 omega_g / 3000 is left, 2e-4 of it.
TEST(CloughPenzien, VarianceIsTheIntegralOfTheDensity) {
  const double omega_g = 15, zeta_g = 0.6, omega_f = 1.5, zeta_f = 0.5;
  constexpr int intervals = 600000;
  const double h = 3000 * omega_g / intervals;
  double sum = 0;
  for (int i = 0; i <= intervals; ++i)
    sum += (i == 0 || i == intervals ? 1
            : i % 2 == 1             ? 4
                                     : 2) *
           clough_penzien_density(i * h, omega_g, zeta_g, omega_f, zeta_f);
  const double expected = 2 * sum * h / 3;
  const auto filter = clough_penzien_filter(omega_g, zeta_g, omega_f, zeta_f, 1, 0.02);
  EXPECT_NEAR(filter.output.dot(filter.stationary * filter.output), expected, 5e-4 * expected);
  const Estimate variance =
      over_seeds(400, [&](std::uint64_t seed) { return lagged_product(filtered_noise(filter, 4000, seed), 0); });
  expect_agrees(variance, expected, expected, "variance");
}

// Crandall & Mark 1963: an oscillator under white noise of two-sided density S0 has the stationary displacement
// variance pi S0 / (2 zeta omega^3). The samples are joined by straight lines, which takes (sin(x) / x)^4 = 1 - omega^2
// dt^2 / 6 off the density; the oscillator of 1 Hz and 10 % is marched by the closed form for a linear load (Nigam &
// Jennings 1969), written anew here as a matrix exponential of (u, v, p, p').
TEST(WhiteNoise, OscillatorHasTheVarianceOfCrandallAndMark) {
  const double omega = 2 * pi, zeta = 0.1, step = 0.02, density = 2;
  Eigen::Matrix4d a = Eigen::Matrix4d::Zero();
  a << 0, 1, 0, 0, -omega * omega, -2 * zeta * omega, -1, 0, 0, 0, 0, 1, 0, 0, 0, 0;
  const Eigen::Matrix4d march = (a * step).eval().exp();
  const Estimate variance = over_seeds(300, [&](std::uint64_t seed) {
    const std::vector<double> noise = sampled_white_noise(density, step, 6000, seed);
    Eigen::Vector4d state = Eigen::Vector4d::Zero();
    double sum = 0;
    constexpr std::size_t settled = 1000;  // 20 s: exp(-2 zeta omega 20) = 1e-11 is left of the start
    for (std::size_t i = 0; i + 1 < noise.size(); ++i) {
      state[2] = noise[i];
      state[3] = (noise[i + 1] - noise[i]) / step;
      state = march * state;
      if (i >= settled) sum += state[0] * state[0];
    }
    return sum / static_cast<double>(noise.size() - 1 - settled);
  });
  const double white = pi * density / (2 * zeta * std::pow(omega, 3));
  expect_agrees(variance, white * (1 - omega * omega * step * step / 6), white, "oscillator");
}

// Suites are independent: the correlation coefficient of two stationary motions of effectively n independent samples
// has the standard error 1 / sqrt(n); estimated here from 200 pairs of neighboring seeds.
TEST(Suites, NeighboringSeedsAreUncorrelated) {
  const auto filter = kanai_tajimi_filter(15, 0.6, 1, 0.01);
  const Estimate correlation = over_seeds(200, [&](std::uint64_t seed) {
    const auto one = filtered_noise(filter, 2000, seed), other = filtered_noise(filter, 2000, seed + 1);
    double product = 0;
    for (std::size_t i = 0; i < one.size(); ++i) product += one[i] * other[i];
    return product / 2000 / std::sqrt(lagged_product(one, 0) * lagged_product(other, 0));
  });
  expect_agrees(correlation, 0, 1, "neighbors");
}

// The normal distribution holds 68.27% within one and 95.45% within two standard deviations (tables).
TEST(NormalNumbers, AreNormal) {
  NormalNumbers normal(11);
  constexpr int count = 200000;
  int one = 0, two = 0, positive = 0;
  for (int i = 0; i < count; ++i) {
    const double x = normal.next();
    one += std::abs(x) < 1;
    two += std::abs(x) < 2;
    positive += x > 0;
  }
  const auto error = [](double p) { return 4 * std::sqrt(p * (1 - p) / count); };
  EXPECT_NEAR(one / double(count), 0.682689, error(0.682689));
  EXPECT_NEAR(two / double(count), 0.954500, error(0.954500));
  EXPECT_NEAR(positive / double(count), 0.5, error(0.5));
}

// C++ standard, [rand.predef]: the 10000th number of a default-constructed generator. What we lean on.
TEST(NormalNumbers, GeneratorIsTheStandardsOwn) {
  std::mt19937_64 generator;
  generator.discard(9999);
  EXPECT_EQ(generator(), 9981545732273789042ULL);
}

// Constant acceleration a over T: v = a T, d = a T^2 / 2; then it falls to zero within one step dt, which adds a dt / 2
// and a T dt + a dt^2 / 3.
TEST(Baseline, VelocityAndDisplacementOfConstantAcceleration) {
  const std::vector<double> acceleration(101, 2.0);
  const double dt = 0.1, T = 10;
  const auto velocity = ground_velocity(acceleration, dt);
  const auto displacement = ground_displacement(acceleration, dt);
  ASSERT_EQ(velocity.size(), 102u);
  EXPECT_NEAR(velocity[100], 20, 1e-12);
  EXPECT_NEAR(velocity[101], 20.1, 1e-12);
  EXPECT_NEAR(displacement[100], 100, 1e-11);
  EXPECT_NEAR(displacement[101], 100 + 2 * T * dt + 2 * dt * dt / 3, 1e-11);
}

TEST(Baseline, TakesOutWhatItsPolynomialCanMake) {
  const std::size_t count = 1001;
  std::vector<double> envelope(count), acceleration(count);
  for (std::size_t i = 0; i < count; ++i) {
    const double s = 2.0 * static_cast<double>(i) / 1000 - 1;
    envelope[i] = 1 - s * s;
    acceleration[i] = envelope[i] * (0.3 - 0.2 * s + 0.5 * s * s * s);
  }
  correct_baseline(acceleration, envelope);
  for (double a : acceleration) ASSERT_NEAR(a, 0, 1e-9);
}

TEST(KanaiTajimi, RefusesTimesThatDoNotGoTogether) {
  const auto make = [](double rise, double strong, SyntheticGrid grid) {
    return made("kanai_tajimi", {{"rise_end", rise}, {"strong_end", strong}}, grid);
  };
  EXPECT_THROW(make(5, 4, {1, 0.01, 20}), Error);   // strong part ends before the rise
  EXPECT_THROW(make(5, 6, {1, 0.01, 4}), Error);    // ends before the rise
  EXPECT_THROW(make(2, 10, {1, 0.05, 20}), Error);  // step coarser than T_g / 10
  EXPECT_NO_THROW(make(2, 10, {1, 0.04, 20}));
}

}  // namespace
}  // namespace pilotis
