// Made motions against the closed forms of their model. Statistical checks allow four standard errors, estimated from
// the spread of independent seeds, and say that this is small enough to notice a wrong formula.
#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/synthetic/baseline.hpp"
#include "core/motion/synthetic/kanai_tajimi.hpp"
#include "core/motion/synthetic/random.hpp"
#include "core/motion/synthetic/registry.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;

struct Estimate {
  double mean = 0, standard_error = 0;
};

template <class F>
Estimate over_seeds(int seeds, F value) {
  double sum = 0, squares = 0;
  for (int seed = 1; seed <= seeds; ++seed) {
    const double v = value(static_cast<std::uint64_t>(seed));
    sum += v;
    squares += v * v;
  }
  const double mean = sum / seeds;
  return {mean, std::sqrt((squares / seeds - mean * mean) / (seeds - 1))};
}

void expect_agrees(const Estimate& estimate, double expected, double scale, const std::string& what) {
  EXPECT_NEAR(estimate.mean, expected, 4 * estimate.standard_error) << what;
  EXPECT_LT(4 * estimate.standard_error, 0.05 * scale) << what << ": too few samples to tell anything";
}

// Mean of f(t) f(t + lag).
double lagged_product(const std::vector<double>& f, std::size_t lag) {
  double sum = 0;
  for (std::size_t i = 0; i + lag < f.size(); ++i) sum += f[i] * f[i + lag];
  return sum / static_cast<double>(f.size() - lag);
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
      return lagged_product(filtered_noise(ground.period, ground.damping, 1, ground.step, 4000, seed), 0);
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
      return lagged_product(filtered_noise(ground.period, ground.damping, 1, ground.step, 4000, seed), lag);
    });
    expect_agrees(product, covariance(omega, ground.damping, static_cast<double>(lag) * ground.step),
                  closed_variance(omega, ground.damping), "lag " + std::to_string(lag));
  }
}

TEST(KanaiTajimi, IsStationaryFromTheFirstSample) {
  const double expected = closed_variance(2 * pi / 0.4, 0.6);
  const Estimate first = over_seeds(20000, [&](std::uint64_t seed) {
    const double f = filtered_noise(0.4, 0.6, 1, 0.01, 1, seed)[0];
    return f * f;
  });
  expect_agrees(first, expected, expected, "first sample");
}

TEST(KanaiTajimi, DensityScalesTheVariance) {
  const double one = lagged_product(filtered_noise(0.4, 0.6, 1, 0.01, 1000, 3), 0);
  EXPECT_NEAR(lagged_product(filtered_noise(0.4, 0.6, 2.5, 0.01, 1000, 3), 0), 2.5 * one, 1e-12 * one);
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

TEST(Envelope, RisesStaysAndDecays) {
  const Envelope envelope{2, 10, 4};
  EXPECT_EQ(envelope.at(0), 0);
  EXPECT_EQ(envelope.at(1), 0.25);
  EXPECT_EQ(envelope.at(2), 1);
  EXPECT_EQ(envelope.at(7), 1);
  EXPECT_EQ(envelope.at(10), 1);
  EXPECT_DOUBLE_EQ(envelope.at(14), std::exp(-1.0));
  EXPECT_DOUBLE_EQ(envelope.at(18), std::exp(-2.0));
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

std::vector<double> usual_values(const Method& method) {
  std::vector<double> values;
  for (const Parameter& parameter : method.parameters) values.push_back(parameter.otherwise.value_or(3.0));
  return values;
}

class EveryKind : public testing::TestWithParam<std::size_t> {
 protected:
  const Method& method() const { return synthetic_catalogue()[GetParam()]; }
  Accelerogram motion(std::uint64_t seed) const {
    return make_synthetic(method().name, usual_values(method()), {seed, 0.01, 20}, "here");
  }
};

TEST_P(EveryKind, IsAValidRecordOfTheAskedLength) {
  const Accelerogram record = motion(7);
  EXPECT_NO_THROW(validate(record, "made"));
  EXPECT_EQ(record.samples.size(), 2001u);
  EXPECT_EQ(record.samples.front(), 0);
  EXPECT_NEAR(std::abs(peak_of(record).value), 3.0, 0.5e-6);  // rounded to 1e-6
}

TEST_P(EveryKind, SameSeedSameMotionOtherSeedOtherMotion) {
  EXPECT_EQ(motion(7).samples, motion(7).samples);
  EXPECT_NE(motion(7).samples, motion(8).samples);
}

// Samples are rounded to 1e-6 m/s2, at most 0.5e-6 each: N dt 0.5e-6 in velocity, T times that in displacement.
TEST_P(EveryKind, GroundIsAtRestAtTheEnd) {
  for (std::uint64_t seed = 1; seed <= 20; ++seed) {
    const Accelerogram record = motion(seed);
    EXPECT_LE(std::abs(ground_velocity(record.samples, record.step).back()), 2001 * 0.01 * 0.5e-6);
    EXPECT_LE(std::abs(ground_displacement(record.samples, record.step).back()), 20.01 * 2001 * 0.01 * 0.5e-6);
  }
}

TEST_P(EveryKind, RefusesEachParameterOutOfRange) {
  for (std::size_t i = 0; i < method().parameters.size(); ++i) {
    const Parameter& parameter = method().parameters[i];
    std::vector<double> values = usual_values(method());
    ASSERT_TRUE(std::isfinite(parameter.least));
    values[i] = parameter.least - 1;
    try {
      make_synthetic(method().name, values, {1, 0.01, 20}, "here");
      ADD_FAILURE() << parameter.key << " is not checked";
    } catch (const Error& e) {
      EXPECT_EQ(e.where(), "here." + std::string(parameter.key));
    }
  }
}

TEST_P(EveryKind, RefusesAnImpossibleGrid) {
  for (const SyntheticGrid& grid : {SyntheticGrid{1, 0, 20},
                                    {1, -0.01, 20},
                                    {1, NAN, 20},
                                    {1, 0.01, 0},
                                    {1, 0.01, 20.005},
                                    {1, 0.01, INFINITY},
                                    {1, 1e-9, 1e6}})
    EXPECT_THROW(make_synthetic(method().name, usual_values(method()), grid, "here"), Error)
        << grid.step << " " << grid.duration;
}

INSTANTIATE_TEST_SUITE_P(Synthetic, EveryKind, testing::Range<std::size_t>(0, synthetic_catalogue().size()),
                         [](const auto& info) { return std::string(synthetic_catalogue()[info.param].name); });

TEST(Synthetic, UnknownNameIsAnErrorThatListsTheKnownOnes) {
  try {
    make_synthetic("earthquake", {}, {}, "here");
    FAIL();
  } catch (const Error& e) {
    EXPECT_NE(std::string(e.what()).find("\"earthquake\""), std::string::npos);
    EXPECT_NE(e.remedy().find("kanai_tajimi"), std::string::npos);
  }
}

TEST(KanaiTajimi, RefusesTimesThatDoNotGoTogether) {
  const auto make = [](double rise, double strong, SyntheticGrid grid) {
    const std::vector<double> values{3, 0.4, 0.6, rise, strong, 4};
    return make_synthetic("kanai_tajimi", values, grid, "here");
  };
  EXPECT_THROW(make(5, 4, {1, 0.01, 20}), Error);   // strong part ends before the rise
  EXPECT_THROW(make(5, 6, {1, 0.01, 4}), Error);    // ends before the rise
  EXPECT_THROW(make(2, 10, {1, 0.05, 20}), Error);  // step coarser than T_g / 10
  EXPECT_NO_THROW(make(2, 10, {1, 0.04, 20}));
}

}  // namespace
}  // namespace pilotis
