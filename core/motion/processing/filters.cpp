#include "core/motion/processing/filters.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"
#include "core/motion/processing/butterworth.hpp"
#include "core/motion/processing/pad.hpp"

namespace pilotis {

namespace {

constexpr Parameter frequency(std::string_view key, std::string_view meaning) {
  return {.key = key, .dimension = Dimension::frequency, .meaning = meaning, .least = 0, .least_allowed = false};
}

constexpr Parameter order{
    .key = "order", .meaning = "order of each pass", .otherwise = 4, .least = 1, .most = 10, .whole = true};
constexpr Parameter pass{.key = "pass",
                         .meaning = "forward and backward without phase shift (acausal), or forward (causal)",
                         .otherwise = 0,
                         .choices = pass_words};

constexpr std::array<Parameter, 4> two_corners{
    {frequency("low", "low corner"), frequency("high", "high corner"), order, pass}};
constexpr std::array<Parameter, 3> low_corner{{frequency("corner", "low corner"), order, pass}};
constexpr std::array<Parameter, 3> high_corner{{frequency("corner", "high corner"), order, pass}};

Pass pass_of(double value) { return static_cast<Pass>(static_cast<int>(value)); }

void require_below_nyquist(std::string_view key, double corner, double step) {
  const double nyquist = 0.5 / step;
  if (corner >= nyquist)
    throw input_error(std::string(key), fmt::format("found {:g} Hz for a record with a step of {:g} s", corner, step),
                      fmt::format("it must be less than the record's Nyquist frequency, {:g} Hz", nyquist));
}

void run(const std::vector<FilterSection>& sections, Pass pass, std::vector<double>& samples) {
  if (pass == Pass::acausal)
    filter_both_ways(sections, samples);
  else
    filter_forward(sections, samples);
}

std::string manner(int order, Pass pass) {
  return fmt::format(
      "order {}, {}", order,
      pass == Pass::acausal ? "acausal (two passes, -6 dB at a corner)" : "causal (one pass, -3 dB at a corner)");
}

// Says so when a filter run both ways has less room than the rule of pad.hpp asks for. What an earlier filter left in
// the zeros around a record is no shaking: under a thousandth of the peak counts as quiet.
std::string room(const Accelerogram& record, int order, double corner, Pass pass) {
  if (pass == Pass::causal) return "";
  const auto& samples = record.samples;
  const double level = 1e-3 * std::abs(peak_of(record).value);
  const auto is_shaking = [level](double sample) { return std::abs(sample) > level; };
  const auto first = std::find_if(samples.begin(), samples.end(), is_shaking);
  const auto last = std::find_if(samples.rbegin(), samples.rend(), is_shaking);
  const double before = record.step * static_cast<double>(first - samples.begin());
  const double after = record.step * static_cast<double>(last - samples.rbegin());
  const double wanted = filter_pad_length(order, corner);
  if (std::min(before, after) >= wanted * (1 - 1e-9)) return "";
  return fmt::format("; quiet for {:g} s before and {:g} s after, where 1.5 n / f_c asks for {:g} s: pad first", before,
                     after, wanted);
}

}  // namespace

const Method Bandpass::method{"bandpass", "Butterworth filter that keeps what is between two corners", two_corners};
const Method Highpass::method{"highpass", "Butterworth filter that keeps what is above a corner", low_corner};
const Method Lowpass::method{"lowpass", "Butterworth filter that keeps what is below a corner", high_corner};

Bandpass Bandpass::make(std::span<const double> values) {
  const Bandpass step{values[0], values[1], static_cast<int>(values[2]), pass_of(values[3])};
  if (step.low >= step.high)
    throw input_error("low", fmt::format("found {:g} Hz", step.low),
                      fmt::format("it must be less than high, {:g} Hz", step.high));
  return step;
}

Highpass Highpass::make(std::span<const double> values) {
  return {values[0], static_cast<int>(values[1]), pass_of(values[2])};
}

Lowpass Lowpass::make(std::span<const double> values) {
  return {values[0], static_cast<int>(values[1]), pass_of(values[2])};
}

Processed Bandpass::applied(const Accelerogram& record) const {
  require_below_nyquist("high", high, record.step);
  Processed out{record,
                fmt::format("{:g} to {:g} Hz, {}{}", low, high, manner(order, pass), room(record, order, low, pass))};
  run(butterworth_bandpass(order, low, high, record.step), pass, out.record.samples);
  return out;
}

Processed Highpass::applied(const Accelerogram& record) const {
  require_below_nyquist("corner", corner, record.step);
  Processed out{record,
                fmt::format("above {:g} Hz, {}{}", corner, manner(order, pass), room(record, order, corner, pass))};
  run(butterworth_highpass(order, corner, record.step), pass, out.record.samples);
  return out;
}

Processed Lowpass::applied(const Accelerogram& record) const {
  require_below_nyquist("corner", corner, record.step);
  Processed out{record,
                fmt::format("below {:g} Hz, {}{}", corner, manner(order, pass), room(record, order, corner, pass))};
  run(butterworth_lowpass(order, corner, record.step), pass, out.record.samples);
  return out;
}

}  // namespace pilotis
