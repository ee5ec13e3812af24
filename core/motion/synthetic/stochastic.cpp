#include "core/motion/synthetic/stochastic.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"
#include "core/motion/fft.hpp"
#include "core/motion/synthetic/baseline.hpp"
#include "core/motion/synthetic/envelope.hpp"
#include "core/motion/synthetic/intensity.hpp"
#include "core/motion/synthetic/random.hpp"

namespace pilotis {

std::vector<double> shaped_noise(const PointSource& source, const std::vector<double>& window, double step,
                                 std::uint64_t seed) {
  NormalNumbers normal(seed);
  std::vector<double> noise(window.size());
  for (std::size_t i = 0; i < noise.size(); ++i) noise[i] = window[i] == 0 ? 0 : window[i] * normal.next();
  std::vector<std::complex<double>> spectrum = fourier_transform(noise);
  double squares = 0;
  for (const std::complex<double>& amplitude : spectrum) squares += std::norm(amplitude);
  const double root_mean_square = std::sqrt(squares / static_cast<double>(spectrum.size()));
  const double df = 1 / (step * static_cast<double>(noise.size()));
  // The transform of samples times the step is the Fourier integral, m/s.
  for (std::size_t k = 0; k < spectrum.size(); ++k)
    spectrum[k] *= source.amplitude_spectrum(static_cast<double>(k) * df) / (step * root_mean_square);
  return inverse_fourier_transform(spectrum, noise.size());
}

namespace stochastic {

namespace {

constexpr CurveParameter curves[] = {{"site", "frequency", "amplification", Dimension::frequency, Dimension::none,
                                      "site amplification over frequency", false}};

// Crust, spreading, Q and path duration: eastern North America, Atkinson & Boore 1995, Bulletin of the Seismological
// Society of America 85, 17, from memory. Stress drop and kappa: common practice.
constexpr std::array<Parameter, 21> parameters{{
    {.key = "magnitude", .meaning = "moment magnitude M", .least = 0, .most = 10},
    {.key = "distance", .dimension = Dimension::length, .meaning = "distance R from the source", .least = 1000},
    positive("stress_drop", Dimension::stress, "stress drop (stress parameter)", 1e7),
    positive("density", Dimension::density, "density rho at the source", 2800),
    positive("shear_velocity", Dimension::velocity, "shear-wave velocity beta at the source", 3800),
    not_negative("spreading_1", Dimension::none, "geometric spreading R^-p1 to hinge_1", 1),
    {.key = "hinge_1",
     .dimension = Dimension::length,
     .meaning = "distance R1 where the spreading changes",
     .otherwise = 7e4,
     .least = 1000},
    not_negative("spreading_2", Dimension::none, "geometric spreading R^-p2 from hinge_1 to hinge_2", 0),
    {.key = "hinge_2",
     .dimension = Dimension::length,
     .meaning = "distance R2 where the spreading changes again",
     .otherwise = 1.3e5,
     .least = 1000},
    not_negative("spreading_3", Dimension::none, "geometric spreading R^-p3 beyond hinge_2", 0.5),
    positive("quality", Dimension::none, "Q0 of Q(f) = Q0 (f / 1 Hz)^n", 680),
    not_negative("quality_exponent", Dimension::none, "n of Q(f) = Q0 (f / 1 Hz)^n", 0.36),
    positive("quality_velocity", Dimension::velocity, "velocity c_Q that Q(f) goes with", 3800),
    not_negative("kappa", Dimension::time, "kappa of exp(-pi kappa f)", 0.03),
    not_negative("f_max", Dimension::frequency, "f_max of 1 / sqrt(1 + (f / f_max)^8) (0: not used)", 0),
    not_negative("source_duration", Dimension::none, "source duration times corner frequency", 1),
    not_negative("path_duration", Dimension::slowness, "path duration over distance", 5e-5),
    damping_ratio("peak_fraction", "epsilon of the window, time of its peak over its length", 0.2),
    damping_ratio("end_level", "eta of the window, its value at its length", 0.05),
    positive("window_factor", Dimension::none, "length of the window over the duration of motion", 2),
    not_negative("lead", Dimension::time, "time before the window", 2),
}};

PointSource source_of(const SyntheticInput& input) {
  PointSource source;
  source.magnitude = input["magnitude"];
  source.stress_drop = input["stress_drop"];
  source.distance = input["distance"];
  source.density = input["density"];
  source.shear_velocity = input["shear_velocity"];
  source.spreading = {input["spreading_1"], input["spreading_2"], input["spreading_3"]};
  source.hinge_distance = {input["hinge_1"], input["hinge_2"]};
  source.quality = input["quality"];
  source.quality_exponent = input["quality_exponent"];
  source.quality_velocity = input["quality_velocity"];
  source.kappa = input["kappa"];
  source.f_max = input["f_max"];
  source.site = input.curve("site");
  if (source.hinge_distance[1] < source.hinge_distance[0])
    throw input_error(input.at("hinge_2"), fmt::format("found {} m", source.hinge_distance[1]),
                      fmt::format("it must not be less than hinge_1, {} m", source.hinge_distance[0]));
  return source;
}

// t_eta, s.
double window_length(const PointSource& source, const SyntheticInput& input) {
  const double motion = input["source_duration"] / source.corner_frequency() + input["path_duration"] * source.distance;
  const double length = input["window_factor"] * motion;
  if (length < 10 * input.grid.step)
    throw input_error(input.at("window_factor"),
                      fmt::format("found {}, by which the window lasts {:.3g} s", input["window_factor"], length),
                      fmt::format("it must last at least ten steps, {} s", 10 * input.grid.step));
  if (input["lead"] + length > input.grid.duration)
    throw input_error(input.at("duration"), fmt::format("found a duration of {} s", input.grid.duration),
                      fmt::format("it must hold lead and window, {:.4g} s", input["lead"] + length));
  return length;
}

std::vector<double> window_samples(double length, const SyntheticInput& input) {
  const SaragoniHartEnvelope form(length, input["peak_fraction"], input["end_level"]);
  std::vector<double> window(input.count(), 0.0);
  for (std::size_t i = 0; i < window.size(); ++i) {
    const double time = static_cast<double>(i) * input.grid.step - input["lead"];
    if (time > 0) window[i] = form.at(time);
  }
  return window;
}

std::vector<std::string> notes_of(const PointSource& source, double length) {
  return {fmt::format("moment {:.4g} N m, corner frequency {:.4g} Hz, window of {:.4g} s", source.moment(),
                      source.corner_frequency(), length)};
}

}  // namespace

const SyntheticKind kind{
    {"stochastic", "point source of omega-squared spectrum by the stochastic method (Boore)", parameters},
    " --magnitude 6 --distance \"20 km\"",
    curves};

MadeMotion make(const SyntheticInput& input) {
  const PointSource source = source_of(input);
  const double length = window_length(source, input);
  std::vector<double> window = window_samples(length, input);
  const std::vector<double> envelope = window;
  window.resize(fast_fourier_size(2 * window.size()), 0.0);
  MadeMotion motion{{}, notes_of(source, length)};
  motion.record.step = input.grid.step;
  motion.record.samples = shaped_noise(source, window, input.grid.step, input.grid.seed);
  motion.record.samples.resize(input.count());
  motion.notes.push_back(correct_baseline(motion.record.samples, envelope));
  motion.notes.push_back(fmt::format("Arias intensity {:.4g} m/s", arias_intensity_of(motion.record)));
  return motion;
}

}  // namespace stochastic

}  // namespace pilotis
