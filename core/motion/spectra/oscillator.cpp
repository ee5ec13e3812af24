#include "core/motion/spectra/oscillator.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

// A period far below the step would cost thousands of sub-steps and show nothing but the peak ground acceleration.
constexpr double periods_per_step = 100;

void validate_oscillator(const Oscillator& oscillator, double step, const std::string& where) {
  const auto [period, damping] = oscillator;
  if (!std::isfinite(period) || period < 0)
    throw input_error(where, fmt::format("found a period of {:g} s", period), "it must be finite and not negative");
  if (period > 0 && period * periods_per_step < step)
    throw input_error(where, fmt::format("found a period of {:g} s with samples every {:g} s", period, step),
                      fmt::format("it must be at least {:g} s, or 0 s for the peak acceleration of the ground itself",
                                  step / periods_per_step));
  if (!(damping >= 0 && damping < 1))
    throw input_error(where, fmt::format("found a damping ratio of {:g}", damping),
                      "it must be at least 0 and below 1");
}

// To the next power of two or three times one.
int rounded_up(int pieces) {
  int power = 1;
  while (power < pieces) power *= 2;
  return power / 4 * 3 >= pieces && power >= 4 ? power / 4 * 3 : power;
}

}  // namespace

Ground ground_of(const Accelerogram& record) { return {record.samples, record.step, record.first_sample_at}; }

void validate(const Ground& ground, const std::string& where) {
  if (!std::isfinite(ground.step) || ground.step <= 0)
    throw input_error(where, fmt::format("found a time step of {:g} s", ground.step),
                      "it must be finite and greater than 0 s");
  if (ground.first_sample_at != 0 && ground.first_sample_at != ground.step)
    throw input_error(where, fmt::format("found the first sample at {:g} s", ground.first_sample_at),
                      fmt::format("it must be at 0 s or at one step, {:g} s", ground.step));
  if (ground.samples.size() < 2)
    throw input_error(where, fmt::format("found {} sample(s)", ground.samples.size()), "at least two are needed");
  for (std::size_t i = 0; i < ground.samples.size(); ++i)
    if (!std::isfinite(ground.samples[i]))
      throw input_error(where, fmt::format("sample {} of {} is {}", i + 1, ground.samples.size(), ground.samples[i]),
                        "every sample must be finite");
}

void validate(std::span<const Oscillator> oscillators, double step, const std::string& where) {
  for (const Oscillator& oscillator : oscillators) validate_oscillator(oscillator, step, where);
}

void validate(const StepRule& rule, const std::string& where) {
  if (!(rule.steps_per_period >= 10 && rule.steps_per_period <= 1000))
    throw input_error(where, fmt::format("found {:g} steps per period", rule.steps_per_period),
                      "it must be from 10 to 1000");
}

int subdivision(double period, double step, const StepRule& rule) {
  if (period == 0) return 0;
  // A whole number that rounding has lifted a little is still that number: 0.1 s at 0.01 s and n = 10 is one step.
  const double steps = rule.steps_per_period * step / period;
  const int pieces = std::max(1, static_cast<int>(std::ceil(steps * (1 - 1e-12))));
  return rule.exact ? pieces : rounded_up(pieces);
}

}  // namespace pilotis
