#include "core/motion/synthetic/pulse.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/synthetic/formula.hpp"

namespace pilotis::pulse {

namespace {

constexpr std::array<std::string_view, 4> shapes{"half_sine", "triangular", "rectangular", "step"};
constexpr std::array<Parameter, 4> parameters{{
    positive("amplitude", Dimension::acceleration, "peak acceleration A"),
    one_of("shape", "shape of the pulse", shapes),
    positive("length", Dimension::time, "length d of the pulse (not of a step)", 1),
    not_negative("start", Dimension::time, "when it starts", 0),
}};

// 1 within the pulse, 1/2 at a jump, 0 outside.
double jumping(double s, double length, bool starts_the_motion, double rounding) {
  if (s < -rounding || s > length + rounding) return 0;
  const bool at_start = s < rounding && !starts_the_motion;
  return at_start || s > length - rounding ? 0.5 : 1;
}

double rising_and_falling(std::string_view shape, double share) {
  if (share < 0 || share > 1) return 0;
  return shape == "half_sine" ? std::sin(std::numbers::pi * share) : 1 - std::abs(2 * share - 1);
}

void require_at_sample(const SyntheticInput& input, std::string_view key) {
  const double steps = input[key] / input.grid.step;
  if (std::abs(steps - std::round(steps)) > 1e-6)
    throw input_error(input.at(key), fmt::format("found {} s", input[key]),
                      fmt::format("it must be a whole number of steps of {} s, because the acceleration jumps there",
                                  input.grid.step));
}

}  // namespace

const SyntheticKind kind{{"pulse", "half-sine, triangular or rectangular pulse, or a step", parameters},
                         " --amplitude \"0.3 g\" --length \"0.5 s\"",
                         {},
                         false};

MadeMotion make(const SyntheticInput& input) {
  const std::string_view shape = input.choice("shape");
  const double amplitude = input["amplitude"], start = input["start"], step = input.grid.step;
  const bool jumps = shape == "rectangular" || shape == "step";
  // A step goes on past the end of the record.
  const double length = shape == "step" ? 2 * input.grid.duration : input["length"];
  require_within(input, "start", start, shape == "step" ? start : start + length);
  if (jumps) require_at_sample(input, "start");
  if (shape == "rectangular") require_at_sample(input, "length");
  require_fine_step(input, "length", length);
  const double rounding = 1e-3 * step;
  return {sampled_formula(input,
                          [&](double time) {
                            const double s = time - start;
                            return amplitude * (jumps ? jumping(s, length, start < rounding, rounding)
                                                      : rising_and_falling(shape, s / length));
                          }),
          {}};
}

}  // namespace pilotis::pulse
