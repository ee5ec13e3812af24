#include "core/motion/synthetic/ricker.hpp"

#include <cmath>
#include <numbers>

#include "core/motion/synthetic/formula.hpp"

namespace pilotis {

namespace {

double gauss(const Ricker& wavelet, double time) {
  const double x = std::numbers::pi * wavelet.frequency * (time - wavelet.center);
  return std::exp(-x * x);
}

}  // namespace

double Ricker::acceleration(double time) const {
  const double x = std::numbers::pi * frequency * (time - center);
  return amplitude * (1 - 2 * x * x) * gauss(*this, time);
}

double Ricker::velocity(double time) const { return amplitude * (time - center) * gauss(*this, time); }

double Ricker::displacement(double time) const {
  const double turn = std::numbers::pi * frequency;
  return -amplitude / (2 * turn * turn) * gauss(*this, time);
}

namespace ricker {

namespace {

constexpr std::array<Parameter, 3> parameters{{
    positive("amplitude", Dimension::acceleration, "peak acceleration A"),
    positive("frequency", Dimension::frequency, "frequency f of the spectrum's peak"),
    not_negative("center", Dimension::time, "time t0 of the peak", 10),
}};

}  // namespace

const SyntheticKind kind{
    {"ricker", "Ricker wavelet", parameters}, " --amplitude \"0.2 g\" --frequency \"1 Hz\"", {}, false};

MadeMotion make(const SyntheticInput& input) {
  const Ricker wavelet{input["amplitude"], input["frequency"], input["center"]};
  const double reach = 1.5 / wavelet.frequency;
  require_within(input, "center", wavelet.center - reach, wavelet.center + reach);
  require_fine_step(input, "frequency", 1 / wavelet.frequency);
  return {sampled_formula(input, [&](double time) { return wavelet.acceleration(time); }), {}};
}

}  // namespace ricker

}  // namespace pilotis
