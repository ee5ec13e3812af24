#include "core/motion/synthetic/envelope.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"

namespace pilotis {

namespace {

// The envelope must have risen to its full height within the duration.
void require_reached(double full_at, std::string_view key, const SyntheticInput& input) {
  if (input.grid.duration < full_at)
    throw input_error(input.at("duration"), fmt::format("found a duration of {} s", input.grid.duration),
                      fmt::format("it must reach the end of the envelope's rise, {} s ({})", full_at, key));
}

JenningsEnvelope jennings_of(const SyntheticInput& input) {
  const JenningsEnvelope envelope{input["rise_end"], input["strong_end"], input["decay_time"]};
  if (envelope.strong_end < envelope.rise_end)
    throw input_error(input.at("strong_end"), fmt::format("found {} s", envelope.strong_end),
                      fmt::format("it must not be before rise_end, {} s", envelope.rise_end));
  require_reached(envelope.rise_end, "rise_end", input);
  return envelope;
}

}  // namespace

double JenningsEnvelope::at(double time) const {
  if (time < rise_end) return (time / rise_end) * (time / rise_end);
  return time <= strong_end ? 1 : std::exp(-(time - strong_end) / decay_time);
}

SaragoniHartEnvelope::SaragoniHartEnvelope(double window_time, double peak_fraction, double end_level)
    : window_time_(window_time),
      b_(-peak_fraction * std::log(end_level) / (1 + peak_fraction * (std::log(peak_fraction) - 1))),
      c_(b_ / peak_fraction) {
  a_ = std::pow(std::numbers::e / peak_fraction, b_);
}

double SaragoniHartEnvelope::at(double time) const {
  const double x = time / window_time_;
  return a_ * std::pow(x, b_) * std::exp(-c_ * x);
}

Envelope envelope_of(const SyntheticInput& input) {
  if (input.choice("envelope") == "jennings") return jennings_of(input);
  require_reached(input["peak_fraction"] * input["window_time"], "peak_fraction times window_time", input);
  return SaragoniHartEnvelope(input["window_time"], input["peak_fraction"], input["end_level"]);
}

std::vector<double> sampled(const Envelope& envelope, const SyntheticInput& input) {
  std::vector<double> values(input.count());
  for (std::size_t i = 0; i < values.size(); ++i) {
    const double time = static_cast<double>(i) * input.grid.step;
    values[i] = std::visit([time](const auto& form) { return form.at(time); }, envelope);
  }
  return values;
}

}  // namespace pilotis
