#include "core/motion/synthetic/harmonic.hpp"

#include <cmath>
#include <numbers>

#include "core/motion/synthetic/formula.hpp"

namespace pilotis::harmonic {

namespace {

constexpr double turn = 2 * std::numbers::pi;

constexpr std::array<Parameter, 4> parameters{{
    positive("amplitude", Dimension::acceleration, "amplitude A"),
    positive("frequency", Dimension::frequency, "frequency f"),
    {.key = "phase", .meaning = "phase phi, rad", .otherwise = 0, .least = -turn, .most = turn},
    not_negative("ramp", Dimension::time, "time of the linear ramp at either end", 0),
}};

}  // namespace

const SyntheticKind kind{{"harmonic", "harmonic acceleration, with a linear ramp at both ends", parameters},
                         " --amplitude \"0.2 g\" --frequency \"2 Hz\" --ramp \"2 s\"",
                         {},
                         false};

MadeMotion make(const SyntheticInput& input) {
  const double amplitude = input["amplitude"], frequency = input["frequency"], phase = input["phase"];
  const double ramp = input["ramp"], duration = input.grid.duration;
  require_within(input, "ramp", 0, 2 * ramp);
  require_fine_step(input, "frequency", 1 / frequency);
  return {sampled_formula(input,
                          [&](double time) {
                            return ramped(time, ramp, duration) * amplitude * std::sin(turn * frequency * time + phase);
                          }),
          {}};
}

}  // namespace pilotis::harmonic
