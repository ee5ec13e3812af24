#include "core/motion/synthetic/kanai_tajimi.hpp"

#include <fmt/format.h>

#include <Eigen/Dense>
#include <cmath>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/synthetic/baseline.hpp"
#include "core/motion/synthetic/random.hpp"

namespace pilotis {

namespace {

// Ground of 0.4 s (omega_g = 15.7 rad/s) damped by 0.6: Kanai's firm ground, from memory.
constexpr std::array<Parameter, 6> parameters{{
    {.key = "pga",
     .dimension = Dimension::acceleration,
     .meaning = "peak ground acceleration",
     .least = 0,
     .least_allowed = false},
    {.key = "ground_period",
     .dimension = Dimension::time,
     .meaning = "period of the ground, 2 pi / omega_g",
     .otherwise = 0.4,
     .least = 0,
     .least_allowed = false},
    {.key = "ground_damping",
     .meaning = "damping ratio of the ground, zeta_g",
     .otherwise = 0.6,
     .least = 0,
     .most = 1,
     .least_allowed = false,
     .most_allowed = false},
    {.key = "rise_end",
     .dimension = Dimension::time,
     .meaning = "end of the quadratic rise of the envelope",
     .otherwise = 2,
     .least = 0,
     .least_allowed = false},
    {.key = "strong_end",
     .dimension = Dimension::time,
     .meaning = "end of the strong part of the envelope",
     .otherwise = 10,
     .least = 0,
     .least_allowed = false},
    {.key = "decay_time",
     .dimension = Dimension::time,
     .meaning = "time in which the envelope then falls to 1/e",
     .otherwise = 4,
     .least = 0,
     .least_allowed = false},
}};

using Matrix2 = Eigen::Matrix2d;
using Vector2 = Eigen::Vector2d;

// State (z, z') of the free damped oscillator one step later.
Matrix2 free_vibration(double omega, double zeta, double step) {
  const double damped = omega * std::sqrt(1 - zeta * zeta);
  const double decay = std::exp(-zeta * omega * step);
  const double c = std::cos(damped * step), s = std::sin(damped * step);
  const double ratio = zeta * omega / damped;
  Matrix2 phi;
  phi << decay * (c + ratio * s), decay * s / damped, -decay * omega * omega * s / damped, decay * (c - ratio * s);
  return phi;
}

// Stationary covariance of (z, z') under white noise (Crandall & Mark 1963): pi S0 / (2 zeta omega^3), pi S0 / (2 zeta
// omega), uncorrelated.
Matrix2 stationary_covariance(double omega, double zeta, double density) {
  const double velocity = std::numbers::pi * density / (2 * zeta * omega);
  return Vector2(velocity / (omega * omega), velocity).asDiagonal();
}

// Rounded to a millionth, exactly as a text with six decimals is read back.
double rounded(double value) { return std::round(value * 1e6) / 1e6; }

void require_sensible(const KanaiTajimi& motion, const SyntheticGrid& grid, const std::string& where) {
  const Envelope& envelope = motion.envelope;
  if (envelope.strong_end < envelope.rise_end)
    throw input_error(where + ".strong_end", fmt::format("found {} s", envelope.strong_end),
                      fmt::format("it must not be before rise_end, {} s", envelope.rise_end));
  if (grid.step > motion.ground_period / 10)
    throw input_error(where + ".step", fmt::format("found a step of {} s", grid.step),
                      fmt::format("it must be at most a tenth of ground_period, {} s", motion.ground_period / 10));
  if (grid.duration < envelope.rise_end)
    throw input_error(where + ".duration", fmt::format("found a duration of {} s", grid.duration),
                      fmt::format("it must reach beyond rise_end, {} s", envelope.rise_end));
}

void scale_to_peak(Accelerogram& record, double pga) {
  const double factor = pga / std::abs(peak_of(record).value);
  for (double& sample : record.samples) sample = rounded(sample * factor);
}

}  // namespace

const Method KanaiTajimi::method{"kanai_tajimi", "white noise filtered by the ground (Kanai, Tajimi), with an envelope",
                                 parameters};

KanaiTajimi KanaiTajimi::make(std::span<const double> values) {
  return {values[0], values[1], values[2], {values[3], values[4], values[5]}};
}

std::vector<double> filtered_noise(double ground_period, double ground_damping, double density, double step,
                                   std::size_t count, std::uint64_t seed) {
  const double omega = 2 * std::numbers::pi / ground_period;
  const Matrix2 phi = free_vibration(omega, ground_damping, step);
  const Matrix2 stationary = stationary_covariance(omega, ground_damping, density);
  const Matrix2 added = stationary - phi * stationary * phi.transpose();
  const Matrix2 root = added.llt().matrixL();
  NormalNumbers normal(seed);
  const auto pair = [&normal] {
    const double first = normal.next();
    return Vector2(first, normal.next());
  };
  Vector2 state = stationary.diagonal().cwiseSqrt().cwiseProduct(pair());
  std::vector<double> output(count);
  for (double& acceleration : output) {
    acceleration = -(2 * ground_damping * omega * state[1] + omega * omega * state[0]);
    state = phi * state + root * pair();
  }
  return output;
}

Accelerogram made(const KanaiTajimi& motion, const SyntheticGrid& grid, const std::string& where) {
  require_sensible(motion, grid, where);
  const auto count = static_cast<std::size_t>(std::lround(grid.duration / grid.step)) + 1;
  Accelerogram record;
  record.step = grid.step;
  record.samples = filtered_noise(motion.ground_period, motion.ground_damping, 1, grid.step, count, grid.seed);
  std::vector<double> envelope(count);
  for (std::size_t i = 0; i < count; ++i) {
    envelope[i] = motion.envelope.at(static_cast<double>(i) * grid.step);
    record.samples[i] *= envelope[i];
  }
  correct_baseline(record.samples, envelope);
  scale_to_peak(record, motion.pga);
  return record;
}

}  // namespace pilotis
