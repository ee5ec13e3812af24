#include "core/motion/processing/resample.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <complex>

#include "core/error.hpp"
#include "core/motion/fft.hpp"

namespace pilotis {

namespace {

constexpr std::array<std::string_view, 2> manners{"band_limited", "linear"};  // in the order of Manner
constexpr int largest_part = 1000;                                            // of the ratio of the steps
constexpr double most_samples = 1e8;  // a slip in the unit must not fill the memory

constexpr std::array<Parameter, 2> parameters{{
    {.key = "to", .dimension = Dimension::time, .meaning = "the new time step", .least = 0, .least_allowed = false},
    {.key = "method", .meaning = "how values between samples are found", .otherwise = 0, .choices = manners},
}};

struct Ratio {
  std::size_t top = 0, bottom = 0;  // 0: there is none
};

// value = top / bottom to 1e-12, by continued fractions.
Ratio ratio_of(double value) {
  double p0 = 0, q0 = 1, p1 = 1, q1 = 0, rest = value;
  while (true) {
    const double whole = std::floor(rest);
    const double p = whole * p1 + p0, q = whole * q1 + q0;
    if (p > largest_part || q > largest_part) return {};
    if (std::abs(p / q - value) <= 1e-12 * value) return {static_cast<std::size_t>(p), static_cast<std::size_t>(q)};
    p0 = p1, q0 = q1, p1 = p, q1 = q;
    rest = 1 / (rest - whole);
  }
}

std::vector<double> from_time_zero(const Accelerogram& record) {
  std::vector<double> samples = record.samples;
  if (record.first_sample_at > 0) samples.insert(samples.begin(), 0.0);
  return samples;
}

struct Resampled {
  std::vector<double> samples;
  double lost = 0;  // share of the energy, 0 to 1
};

Resampled band_limited(std::vector<double> samples, const Ratio& ratio) {
  const std::size_t blocks = fast_fourier_size((2 * samples.size() + ratio.top - 1) / ratio.top);
  const std::size_t old_size = blocks * ratio.top, new_size = blocks * ratio.bottom;
  samples.resize(old_size, 0.0);
  const std::vector<std::complex<double>> spectrum = fourier_transform(samples);
  std::vector<std::complex<double>> kept(new_size / 2 + 1);
  const double scale = static_cast<double>(new_size) / static_cast<double>(old_size);
  double all = 0, lost = 0;
  for (std::size_t k = 0; k < spectrum.size(); ++k) {
    // X_0 and X_(N/2) stand for themselves, every other for its conjugate too. Half of X_(N/2) belongs to either side.
    const bool middle = 2 * k == old_size;
    const double energy = (k == 0 || middle ? 1 : 2) * std::norm(spectrum[k]);
    const bool stays = 2 * k < new_size || new_size == old_size;
    all += energy;
    lost += stays ? 0 : energy;
    if (stays) kept[k] = spectrum[k] * (middle && new_size > old_size ? 0.5 * scale : scale);
  }
  return {inverse_fourier_transform(kept, new_size), all > 0 ? lost / all : 0};
}

std::vector<double> linear(const std::vector<double>& samples, double ratio, std::size_t count) {
  std::vector<double> out(count);
  for (std::size_t i = 0; i < count; ++i) {
    const double place = static_cast<double>(i) * ratio;
    const auto left = std::min(static_cast<std::size_t>(place), samples.size() - 2);
    out[i] = std::lerp(samples[left], samples[left + 1], place - static_cast<double>(left));
  }
  return out;
}

}  // namespace

const Method Resample::method{"resample", "the record at another time step", parameters};

Resample Resample::make(std::span<const double> values) {
  return {values[0], static_cast<Manner>(static_cast<int>(values[1]))};
}

Processed Resample::applied(const Accelerogram& record) const {
  const std::vector<double> samples = from_time_zero(record);
  const double steps = record.duration() / step * (1 + 1e-12);  // the last bit must not cost a sample
  if (steps < 1 || steps > most_samples)
    throw input_error("to", fmt::format("found {:g} s for a record of {:g} s", step, record.duration()),
                      fmt::format("it must divide the record into 1 to {:.0e} steps", most_samples));
  const auto count = static_cast<std::size_t>(steps) + 1;
  Processed out{{step, 0, {}}, fmt::format("{:g} s to {:g} s, ", record.step, step)};
  if (manner == Manner::linear) {
    out.record.samples = linear(samples, step / record.step, count);
    out.done += "linear between samples";
    if (step > record.step) out.done += fmt::format("; what was above {:g} Hz is aliased", 0.5 / step);
    return out;
  }
  const Ratio ratio = ratio_of(step / record.step);
  if (ratio.top == 0)
    throw input_error("to", fmt::format("found {} s for a record with a step of {} s", step, record.step),
                      fmt::format("band_limited needs steps that are to each other as whole numbers up to {}; choose "
                                  "another step, or method = \"linear\"",
                                  largest_part));
  Resampled resampled = band_limited(samples, ratio);
  resampled.samples.resize(count);
  out.record.samples = std::move(resampled.samples);
  out.done += "band limited, ";
  out.done += step > record.step ? fmt::format("information lost: all at and above {:g} Hz, {:.3g} % of the energy",
                                               0.5 / step, 100 * resampled.lost)
                                 : "nothing lost";
  return out;
}

}  // namespace pilotis
