// Band matrices: the factors over packs have the scalar's bits; the solution is Eigen's dense one (Eigen 3.4, the
// outside reference). Tolerance: LDL^T of a positive definite matrix of order n has a backward error of about n eps |A|
// (Higham, Accuracy and Stability of Numerical Algorithms, ch. 10, from memory), so x is off by at most n eps cond(A)
// |x|.
#include "core/system/band.hpp"

#include <gtest/gtest.h>

#include <Eigen/Dense>
#include <cstring>
#include <random>

#include "core/system/modes.hpp"

namespace pilotis {
namespace {

constexpr int longest = 40, widest = 5;
constexpr double eps = 2.3e-16;

// Symmetric, and dominated by its diagonal by a little: positive definite, as effective stiffnesses are.
Band random_band(int n, int half, std::mt19937& dice) {
  std::uniform_real_distribution<double> entry(-1, 1);
  Band band(n, half);
  for (int j = 0; j < n; ++j)
    for (int i = j + 1; i <= std::min(n - 1, j + half); ++i) {
      const double value = entry(dice);
      band.add(i, j, value);
      band.add(i, i, std::abs(value));
      band.add(j, j, std::abs(value));
    }
  for (int j = 0; j < n; ++j) band.add(j, j, 0.1 + std::abs(entry(dice)));
  return band;
}

std::vector<double> random_vector(int n, std::mt19937& dice) {
  std::uniform_real_distribution<double> entry(-10, 10);
  std::vector<double> x(n);
  for (double& value : x) value = entry(dice);
  return x;
}

template <class F>
void for_each_size(F f) {
  for (int n = 1; n <= longest; ++n)
    for (int half = 0; half <= std::min(widest, n - 1); ++half) f(n, half);
}

TEST(BandMatrix, StoresBothTriangles) {
  Band band(4, 1);
  band.add(1, 2, 5.0);
  band.add(2, 1, 1.0);
  EXPECT_EQ(band.at(1, 2), 6);
  EXPECT_EQ(band.at(2, 1), 6);
  EXPECT_EQ(band.at(0, 3), 0);
  EXPECT_EQ(dense(band)(1, 2), 6);
}

TEST(BandMatrix, ProductIsTheDenseProduct) {
  std::mt19937 dice(1);
  for_each_size([&](int n, int half) {
    const Band band = random_band(n, half, dice);
    const std::vector<double> x = random_vector(n, dice);
    std::vector<double> y(n, 1.0);
    band_multiply_add(band, x.data(), y.data());
    const Eigen::Map<const Eigen::VectorXd> dense_x(x.data(), n);
    const Eigen::VectorXd expected = Eigen::VectorXd::Ones(n) + dense(band) * dense_x;
    // A row has at most 2 widest + 1 terms, each with one rounding of its product and one of its sum.
    const double scale = dense(band).cwiseAbs().rowwise().sum().maxCoeff() * 10 + 1;
    for (int i = 0; i < n; ++i) EXPECT_NEAR(y[i], expected[i], 2 * (2 * widest + 2) * eps * scale);
  });
}

TEST(BandMatrix, SolvesLikeADenseSolver) {
  std::mt19937 dice(2);
  for_each_size([&](int n, int half) {
    const Band band = random_band(n, half, dice);
    const std::vector<double> b = random_vector(n, dice);
    std::vector<double> factors = band.entries, x = b;
    band_factor(factors.data(), n, half);
    band_solve(factors.data(), n, half, x.data());
    const Eigen::MatrixXd a = dense(band);
    const Eigen::Map<const Eigen::VectorXd> dense_b(b.data(), n), dense_x(x.data(), n);
    const Eigen::VectorXd expected = a.ldlt().solve(dense_b);
    const Eigen::VectorXd spectrum = a.selfadjointView<Eigen::Lower>().eigenvalues();
    const double condition = spectrum.maxCoeff() / spectrum.minCoeff();
    // Both solvers err, hence twice; and twice more for the constant of the estimate.
    EXPECT_LE((dense_x - expected).norm(), 4 * n * eps * condition * expected.norm()) << n << " " << half;
    EXPECT_LE((a * dense_x - dense_b).norm(), 4 * n * eps * spectrum.maxCoeff() * dense_x.norm()) << n << " " << half;
  });
}

// W different matrices and right-hand sides at once, against one at a time.
template <int W>
void expect_scalar_bits(int n, int half, std::mt19937& dice) {
  using R = Pack<W>;
  std::vector<std::vector<double>> factors, solutions;
  std::vector<R> a(std::size_t(n) * (half + 1)), x(n);
  for (int w = 0; w < W; ++w) {
    factors.push_back(random_band(n, half, dice).entries);
    solutions.push_back(random_vector(n, dice));
    for (std::size_t i = 0; i < a.size(); ++i) set_lane(a[i], w, factors[w][i]);
    for (int i = 0; i < n; ++i) set_lane(x[i], w, solutions[w][i]);
    band_factor(factors[w].data(), n, half);
    band_solve(factors[w].data(), n, half, solutions[w].data());
  }
  band_factor(a.data(), n, half);
  band_solve(a.data(), n, half, x.data());
  for (int w = 0; w < W; ++w) {
    // EXPECT_EQ on doubles: no zero of either sign and no NaN is among them, so equal is the same bits.
    for (std::size_t i = 0; i < a.size(); ++i) EXPECT_EQ(lane(a[i], w), factors[w][i]) << n << " " << half;
    for (int i = 0; i < n; ++i) EXPECT_EQ(lane(x[i], w), solutions[w][i]) << n << " " << half;
  }
}

TEST(BandMatrix, PacksGiveTheScalarBits) {
  std::mt19937 dice(3);
  for_each_size([&](int n, int half) {
    expect_scalar_bits<2>(n, half, dice);
    expect_scalar_bits<4>(n, half, dice);
    expect_scalar_bits<8>(n, half, dice);
  });
}

TEST(BandMatrix, VanishingPivotGivesWhatIsNotFinite) {
  Band band(2, 1);  // [[1, 1], [1, 1]]
  band.add(0, 0, 1);
  band.add(1, 0, 1);
  band.add(1, 1, 1);
  std::vector<double> factors = band.entries, x{1, 2};
  band_factor(factors.data(), 2, 1);
  band_solve(factors.data(), 2, 1, x.data());
  EXPECT_FALSE(std::isfinite(x[0]) && std::isfinite(x[1]));
}

}  // namespace
}  // namespace pilotis
