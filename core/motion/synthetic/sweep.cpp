#include "core/motion/synthetic/sweep.hpp"

#include <cmath>
#include <numbers>

#include "core/motion/synthetic/formula.hpp"

namespace pilotis {

namespace {

constexpr double turn = 2 * std::numbers::pi;

}  // namespace

double linear_sweep_phase(double time, double from, double to, double duration) {
  return turn * (from * time + (to - from) * time * time / (2 * duration));
}

double logarithmic_sweep_phase(double time, double from, double to, double duration) {
  const double octaves = std::log(to / from);  // natural ones
  if (octaves == 0) return turn * from * time;
  return turn * from * duration / octaves * std::expm1(octaves * time / duration);
}

namespace sweep {

namespace {

constexpr std::array<std::string_view, 2> spacings{"linear", "logarithmic"};
constexpr std::array<Parameter, 5> parameters{{
    positive("amplitude", Dimension::acceleration, "amplitude A"),
    positive("from", Dimension::frequency, "frequency f1 at the start"),
    positive("to", Dimension::frequency, "frequency f2 at the end"),
    one_of("spacing", "how the frequency goes", spacings),
    not_negative("ramp", Dimension::time, "time of the linear ramp at either end", 0),
}};

}  // namespace

const SyntheticKind kind{{"sweep", "sine of rising or falling frequency, linear or logarithmic", parameters},
                         " --amplitude \"0.1 g\" --from \"0.5 Hz\" --to \"10 Hz\" --spacing logarithmic",
                         {},
                         false};

MadeMotion make(const SyntheticInput& input) {
  const double amplitude = input["amplitude"], from = input["from"], to = input["to"], ramp = input["ramp"];
  const double duration = input.grid.duration;
  const auto phase = input.choice("spacing") == "linear" ? linear_sweep_phase : logarithmic_sweep_phase;
  require_within(input, "ramp", 0, 2 * ramp);
  require_fine_step(input, from > to ? "from" : "to", 1 / std::max(from, to));
  return {sampled_formula(input,
                          [&](double time) {
                            return ramped(time, ramp, duration) * amplitude * std::sin(phase(time, from, to, duration));
                          }),
          {}};
}

}  // namespace sweep

}  // namespace pilotis
