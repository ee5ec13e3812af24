#include "core/motion/synthetic/near_fault_pulse.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "core/motion/synthetic/formula.hpp"

namespace pilotis {

using std::numbers::pi;

double NearFaultPulse::acceleration(double time) const {
  const double s = time - center;
  if (std::abs(s) > half_length()) return 0;
  const double slow = 2 * pi * frequency * s / gamma, fast = 2 * pi * frequency * s + nu;
  return -amplitude * pi * frequency / gamma *
         (std::sin(slow) * std::cos(fast) + gamma * std::sin(fast) * (1 + std::cos(slow)));
}

double NearFaultPulse::velocity(double time) const {
  const double s = time - center;
  if (std::abs(s) > half_length()) return 0;
  const double slow = 2 * pi * frequency * s / gamma, fast = 2 * pi * frequency * s + nu;
  return amplitude / 2 * (1 + std::cos(slow)) * std::cos(fast);
}

double NearFaultPulse::displacement(double time) const {
  // cos(slow) cos(fast) is the mean of the cosines of their difference and sum.
  const auto integral = [this](double s) {
    const double turn = 2 * pi * frequency * s;
    return amplitude / (4 * pi * frequency) *
           (std::sin(turn + nu) + gamma / (2 * (gamma - 1)) * std::sin(turn * (gamma - 1) / gamma + nu) +
            gamma / (2 * (gamma + 1)) * std::sin(turn * (gamma + 1) / gamma + nu));
  };
  const double s = std::clamp(time - center, -half_length(), half_length());
  return integral(s) - integral(-half_length());
}

namespace near_fault_pulse {

namespace {

constexpr std::array<Parameter, 5> parameters{{
    positive("amplitude", Dimension::velocity, "amplitude A of the velocity"),
    positive("frequency", Dimension::frequency, "prevailing frequency f_p"),
    {.key = "gamma", .meaning = "gamma, number of half cycles", .otherwise = 2, .least = 1, .least_allowed = false},
    {.key = "nu", .meaning = "phase nu, rad", .otherwise = 0, .least = -2 * pi, .most = 2 * pi},
    not_negative("center", Dimension::time, "time t0 of the middle of the pulse", 10),
}};

}  // namespace

const SyntheticKind kind{
    {"near_fault_pulse", "velocity pulse of the near fault (Mavroeidis, Papageorgiou)", parameters},
    " --amplitude \"60 cm/s\" --frequency \"0.5 Hz\"",
    {},
    false};

MadeMotion make(const SyntheticInput& input) {
  const NearFaultPulse pulse{input["amplitude"], input["frequency"], input["gamma"], input["nu"], input["center"]};
  require_within(input, "center", pulse.center - pulse.half_length(), pulse.center + pulse.half_length());
  require_fine_step(input, "frequency", 1 / pulse.frequency);
  return {sampled_formula(input, [&](double time) { return pulse.acceleration(time); }),
          {fmt::format("the ground comes to rest displaced by {:.4g} m", pulse.displacement(input.grid.duration))}};
}

}  // namespace near_fault_pulse

}  // namespace pilotis
