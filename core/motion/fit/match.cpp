#include "core/motion/fit/match.hpp"

#include <fmt/format.h>

#include <Eigen/Dense>
#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/spectra/signed_peaks.hpp"
#include "core/motion/synthetic/baseline.hpp"

namespace pilotis {

namespace {

constexpr double off_diagonal = 0.7;  // Lilhanand & Tseng; Hancock et al.: steadies the iteration

// One matched oscillator.
struct Point {
  double period = 0, damping = 0, target = 0;
};

void require_point(const Point& point, const Accelerogram& record, const std::string& where) {
  const bool finite = std::isfinite(point.period) && std::isfinite(point.damping) && std::isfinite(point.target);
  if (!finite || point.damping <= 0 || point.damping >= 1 || point.target <= 0)
    throw input_error(
        where,
        fmt::format("found {} m/s2 at {} s for a damping ratio of {}", point.target, point.period, point.damping),
        "the target must be greater than 0 m/s2, the damping ratio greater than 0 and less than 1");
  if (point.period < 2 * record.step || point.period > record.duration())
    throw input_error(where, fmt::format("found the period {} s", point.period),
                      fmt::format("it must be from two steps, {} s, to the record's duration, {} s", 2 * record.step,
                                  record.duration()));
}

std::vector<Point> points_of(std::span<const MatchTarget> targets, const Accelerogram& record,
                             const std::string& where) {
  std::vector<Point> points;
  for (const MatchTarget& target : targets) {
    if (target.periods.size() != target.pseudo_accelerations.size())
      throw input_error(
          where,
          fmt::format("found {} periods and {} ordinates", target.periods.size(), target.pseudo_accelerations.size()),
          "there must be as many of both");
    for (std::size_t i = 0; i < target.periods.size(); ++i) {
      points.push_back({target.periods[i], target.damping, target.pseudo_accelerations[i]});
      require_point(points.back(), record, where);
      if (i > 0 && target.periods[i] <= target.periods[i - 1])
        throw input_error(where,
                          fmt::format("found the period {} s after {} s", target.periods[i], target.periods[i - 1]),
                          "periods must rise");
    }
  }
  if (points.empty()) throw input_error(where, "found no period to match", "at least one is needed");
  return points;
}

// The largest response of a matched oscillator.
struct Peak {
  double pseudo_acceleration = 0;  // omega^2 u with its sign, m/s2
  double time = 0;                 // s
};

std::vector<Peak> peaks_of(const Accelerogram& record, const std::vector<Point>& points, const std::string& where) {
  std::vector<Oscillator> oscillators;
  for (const Point& point : points) oscillators.push_back({point.period, point.damping});
  const std::vector<SignedPeak> displacements = signed_peaks(ground_of(record), oscillators, where);
  std::vector<Peak> peaks;
  for (std::size_t i = 0; i < points.size(); ++i) {
    const double omega = 2 * std::numbers::pi / points[i].period;
    peaks.push_back({omega * omega * displacements[i].displacement, displacements[i].time});
  }
  return peaks;
}

double deviation_of(const std::vector<Peak>& peaks, const std::vector<Point>& points) {
  double deviation = 0;
  for (std::size_t i = 0; i < points.size(); ++i)
    deviation = std::max(deviation, std::abs(std::abs(peaks[i].pseudo_acceleration) / points[i].target - 1));
  return deviation;
}

// omega^2 u of the oscillator at `time` is the sum of these weights times the samples: Duhamel's integral by the
// trapezoidal rule. Good to (omega dt)^2 / 12, which is all that an iteration's slope needs.
std::vector<double> response_weights(const Accelerogram& record, const Point& point, double time) {
  const double omega = 2 * std::numbers::pi / point.period;
  const double damped = omega * std::sqrt(1 - point.damping * point.damping);
  std::vector<double> weights(record.samples.size(), 0.0);
  for (std::size_t i = 0; i < weights.size(); ++i) {
    const double ago = time - record.first_sample_at - record.step * static_cast<double>(i);
    if (ago <= 0) break;
    weights[i] =
        -record.step * omega * omega / damped * std::exp(-point.damping * omega * ago) * std::sin(damped * ago);
  }
  return weights;
}

// Adds to `record` what brings each response at its peak's time to its target, as far as the response is linear.
void add_wavelets(Accelerogram& record, const std::vector<Point>& points, const std::vector<Peak>& peaks) {
  const auto count = static_cast<Eigen::Index>(points.size());
  const auto samples = static_cast<Eigen::Index>(record.samples.size());
  Eigen::MatrixXd wavelets(samples, count), weights(samples, count);
  Eigen::VectorXd wanted(count);
  for (Eigen::Index j = 0; j < count; ++j) {
    const Point& point = points[static_cast<std::size_t>(j)];
    const Peak& peak = peaks[static_cast<std::size_t>(j)];
    const std::vector<double> wavelet = match_wavelet(record, point.period, point.damping, peak.time);
    const std::vector<double> weight = response_weights(record, point, peak.time);
    wavelets.col(j) = Eigen::Map<const Eigen::VectorXd>(wavelet.data(), samples);
    weights.col(j) = Eigen::Map<const Eigen::VectorXd>(weight.data(), samples);
    wanted[j] = std::copysign(point.target, peak.pseudo_acceleration) - peak.pseudo_acceleration;
  }
  Eigen::MatrixXd matrix = weights.transpose() * wavelets;
  const Eigen::VectorXd diagonal = matrix.diagonal();
  matrix *= off_diagonal;
  matrix.diagonal() = diagonal;
  const Eigen::VectorXd added = wavelets * matrix.fullPivLu().solve(wanted);
  for (Eigen::Index i = 0; i < samples; ++i) record.samples[static_cast<std::size_t>(i)] += added[i];
}

void require_settings(const MatchSettings& settings, const std::string& where) {
  if (!(settings.tolerance > 0) || settings.iterations < 1)
    throw input_error(where,
                      fmt::format("found a tolerance of {} and {} iterations", settings.tolerance, settings.iterations),
                      "the tolerance must be greater than 0, and at least one iteration is needed");
}

}  // namespace

std::vector<double> match_wavelet(const Accelerogram& record, double period, double damping, double peak) {
  const double frequency = 1 / period, root = std::sqrt(1 - damping * damping);
  const double damped = 2 * std::numbers::pi * frequency * root;
  const double center = peak - std::atan(root / damping) / damped;
  const double gamma = 1.178 * std::pow(frequency, -0.93);
  std::vector<double> wavelet(record.samples.size()), level(wavelet.size()), slope(wavelet.size());
  for (std::size_t i = 0; i < wavelet.size(); ++i) {
    const double s = record.first_sample_at + record.step * static_cast<double>(i) - center;
    level[i] = std::exp(-(s / gamma) * (s / gamma));
    slope[i] = s / gamma * level[i];
    wavelet[i] = std::cos(damped * s) * level[i];
  }
  const auto rest = [&](const std::vector<double>& shape) {
    return Eigen::Vector2d(ground_velocity(shape, record.step).back(),
                           ground_displacement(shape, record.step).back() / record.duration());
  };
  Eigen::Matrix2d conditions;
  conditions << rest(level), rest(slope);
  const Eigen::Vector2d taken = conditions.fullPivLu().solve(rest(wavelet));
  for (std::size_t i = 0; i < wavelet.size(); ++i) wavelet[i] -= taken[0] * level[i] + taken[1] * slope[i];
  return wavelet;
}

Match matched(const Accelerogram& record, std::span<const MatchTarget> targets, const MatchSettings& settings,
              const std::string& where) {
  validate(record, where);
  require_settings(settings, where);
  const std::vector<Point> points = points_of(targets, record, where);
  Accelerogram trial = record;
  Match best;
  best.deviation = std::numeric_limits<double>::infinity();
  for (int iteration = 0;; ++iteration) {
    const std::vector<Peak> peaks = peaks_of(trial, points, where);
    const double deviation = deviation_of(peaks, points);
    if (deviation < best.deviation) best = {trial, deviation <= settings.tolerance, deviation, 0};
    best.iterations = iteration;
    if (best.within_tolerance || iteration == settings.iterations) return best;
    add_wavelets(trial, points, peaks);
  }
}

}  // namespace pilotis
