#include "core/motion/synthetic/spectrum_compatible.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <complex>
#include <limits>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/fft.hpp"
#include "core/motion/spectra/response_spectrum.hpp"
#include "core/motion/synthetic/baseline.hpp"
#include "core/motion/synthetic/curve.hpp"
#include "core/motion/synthetic/envelope.hpp"
#include "core/motion/synthetic/random.hpp"

namespace pilotis {

namespace {

using std::numbers::pi;

// Square of the median peak over the standard deviation; not below 1, which keeps short durations meaningful.
double peak_factor_squared(double omega, double damping, double duration) {
  const double twice_n = std::max(2 * omega * duration / (2 * pi * std::numbers::ln2), std::numbers::e);
  const double bandwidth = std::pow(4 * damping / pi, 0.6);  // delta^1.2
  return std::max(2 * std::log(twice_n * (1 - std::exp(-bandwidth * std::sqrt(pi * std::log(twice_n))))), 1.0);
}

}  // namespace

std::vector<double> density_of_target(const Curve& target, double damping, double duration,
                                      const std::vector<double>& frequencies) {
  constexpr double least_share = 0.01;  // where the integral leaves nothing, so that the iteration can raise it
  std::vector<double> density;
  double below = 0;
  const double spacing = frequencies.size() > 1 ? frequencies[1] - frequencies[0] : 0;
  for (double omega : frequencies) {
    const double fading = damping / (1 - std::exp(-2 * damping * omega * duration));
    const double variance = std::pow(log_log(target, 2 * pi / omega), 2) / peak_factor_squared(omega, fading, duration);
    // A damping so large that the oscillator filters nothing: the usual factor at 5 % instead of none.
    const double sharpness = std::max(pi / (4 * fading) - 1, 1.0);
    density.push_back(std::max(variance - below, least_share * variance) / (omega * sharpness));
    below += density.back() * spacing;
  }
  return density;
}

std::vector<double> target_grid(double shortest, double longest) {
  return period_grid(shortest, longest, 100, "target spectrum");
}

namespace spectrum_compatible {

namespace {

constexpr CurveParameter curves[] = {{"target", "period", "acceleration", Dimension::time, Dimension::acceleration,
                                      "target spectrum, pseudo-acceleration over period", true, true}};
constexpr std::array<Parameter, 4> own_parameters{{
    damping_ratio("damping", "damping ratio of the target spectrum", 0.05),
    {.key = "tolerance",
     .meaning = "largest deviation from the target, as a share of it",
     .otherwise = 0.15,
     .least = 0,
     .most = 1,
     .least_allowed = false},
    {.key = "iterations",
     .meaning = "most iterations on the spectrum with one set of phases",
     .otherwise = 20,
     .least = 0,
     .most = 1000,
     .whole = true},
    {.key = "draws", .meaning = "most sets of phases tried", .otherwise = 20, .least = 1, .most = 1000, .whole = true},
}};
constexpr auto parameters = joined(own_parameters, envelope_parameters);

// Sinusoids reach down to this many times the target's longest period, or the spectrum there could not be raised.
constexpr double longest_share = 1.3;

// The sinusoids: one for each bin of the Fourier transform within the target's periods.
class Sinusoids {
 public:
  Sinusoids(const SyntheticInput& input, double strong_duration, NormalNumbers& numbers)
      : size_(fast_fourier_size(input.count())), count_(input.count()) {
    const Curve& target = input.curve("target");
    spacing_ = 2 * pi / (static_cast<double>(size_) * input.grid.step);
    const double lowest = 2 * pi / (longest_share * target.x.back()), highest = 2 * pi / target.x.front();
    first_ = static_cast<std::size_t>(std::ceil(lowest / spacing_));
    for (std::size_t k = first_; static_cast<double>(k) * spacing_ <= highest; ++k)
      frequencies_.push_back(static_cast<double>(k) * spacing_);
    density_ = density_of_target(target, input["damping"], strong_duration, frequencies_);
    for (std::size_t k = 0; k < frequencies_.size(); ++k)
      phases_.push_back(std::polar(1.0, 2 * pi * numbers.uniform()));
  }

  // The sum at every sample, m/s2.
  std::vector<double> sum() const {
    std::vector<std::complex<double>> half(size_ / 2 + 1);
    for (std::size_t k = 0; k < frequencies_.size(); ++k)
      half[first_ + k] = std::sqrt(2 * density_[k] * spacing_) * phases_[k] * (static_cast<double>(size_) / 2);
    std::vector<double> samples = inverse_fourier_transform(half, size_);
    samples.resize(count_);
    return samples;
  }

  // Multiplies the density at each frequency by the square of `ratio` at its period.
  void multiply(const Curve& ratio) {
    for (std::size_t k = 0; k < frequencies_.size(); ++k)
      density_[k] *= std::pow(log_log(ratio, 2 * pi / frequencies_[k]), 2);
  }

 private:
  std::size_t size_, count_, first_ = 1;
  double spacing_ = 0;
  std::vector<double> frequencies_, density_;
  std::vector<std::complex<double>> phases_;
};

void require_fitting_grid(const SyntheticInput& input) {
  const Curve& target = input.curve("target");
  if (input.grid.step > target.x.front() / 5 * (1 + 1e-9))
    throw input_error(
        input.at("step"), fmt::format("found a step of {} s", input.grid.step),
        fmt::format("it must be at most a fifth of the target's shortest period, {} s", target.x.front() / 5));
  if (input.grid.duration < target.x.back())
    throw input_error(input.at("duration"), fmt::format("found a duration of {} s", input.grid.duration),
                      fmt::format("it must not be shorter than the target's longest period, {} s", target.x.back()));
}

double integral_of_square(const std::vector<double>& envelope, double step) {
  double sum = 0;
  for (double value : envelope) sum += value * value;
  return sum * step;
}

struct Trial {
  MadeMotion motion;
  Curve ratio;           // target over spectrum, at the periods of the grid
  double deviation = 0;  // largest, as a share of the target
  double worst = 0;      // its period, s
};

Trial tried(const Sinusoids& sinusoids, const std::vector<double>& envelope, const SyntheticInput& input,
            const std::vector<double>& periods) {
  Trial trial;
  trial.motion.record.step = input.grid.step;
  std::vector<double>& samples = trial.motion.record.samples = sinusoids.sum();
  for (std::size_t i = 0; i < samples.size(); ++i) samples[i] *= envelope[i];
  trial.motion.notes = {correct_baseline(samples, envelope)};
  const double damping = input["damping"];
  const std::vector<double> spectrum =
      response_spectrum(ground_of(trial.motion.record), periods, {&damping, 1}, input.where)
          .curves.front()
          .pseudo_acceleration;
  trial.ratio.x = periods;
  for (std::size_t i = 0; i < periods.size(); ++i) {
    const double target = log_log(input.curve("target"), periods[i]);
    trial.ratio.y.push_back(target / spectrum[i]);
    const double deviation = std::abs(spectrum[i] / target - 1);
    if (deviation > trial.deviation) trial.worst = periods[i];
    trial.deviation = std::max(trial.deviation, deviation);
  }
  return trial;
}

}  // namespace

const SyntheticKind kind{
    {"spectrum_compatible", "sinusoids iterated onto a target response spectrum (Gasparini, Vanmarcke)", parameters},
    " --target en_1998 --ag \"0.25 g\" --type 1 --ground B",
    curves};

namespace {

// The best of one set of phases, iterated as far as the tolerance or the number of iterations allows.
Trial iterated(Sinusoids sinusoids, const std::vector<double>& envelope, const SyntheticInput& input,
               const std::vector<double>& periods) {
  Trial trial = tried(sinusoids, envelope, input, periods);
  Trial best = trial;
  for (int i = 0; best.deviation > input["tolerance"] && i < input["iterations"]; ++i) {
    sinusoids.multiply(trial.ratio);
    trial = tried(sinusoids, envelope, input, periods);
    if (trial.deviation < best.deviation) best = trial;
  }
  return best;
}

}  // namespace

MadeMotion make(const SyntheticInput& input) {
  require_fitting_grid(input);
  const std::vector<double> envelope = sampled(envelope_of(input), input);
  const Curve& target = input.curve("target");
  const std::vector<double> periods = target_grid(target.x.front(), target.x.back());
  const double strong = integral_of_square(envelope, input.grid.step);
  NormalNumbers numbers(input.grid.seed);
  Trial best;
  best.deviation = std::numeric_limits<double>::infinity();
  int draw = 0;
  for (; best.deviation > input["tolerance"] && draw < input["draws"]; ++draw) {
    Trial trial = iterated(Sinusoids(input, strong, numbers), envelope, input, periods);
    if (trial.deviation < best.deviation) best = std::move(trial);
  }
  if (best.deviation > input["tolerance"])
    throw input_error(input.at("tolerance"),
                      fmt::format("found {}, but with {} sets of phases and {} iterations each the spectrum came only "
                                  "within {:.3g} % of the target, worst at {:.3g} s",
                                  input["tolerance"], draw, input["iterations"], 100 * best.deviation, best.worst),
                      "a wider tolerance, more draws or iterations, or a longer strong part is needed");
  best.motion.notes.push_back(fmt::format("spectrum within {:.3g} % of the target from {} to {} s, set of phases {}",
                                          100 * best.deviation, target.x.front(), target.x.back(), draw));
  return best.motion;
}

}  // namespace spectrum_compatible

}  // namespace pilotis
