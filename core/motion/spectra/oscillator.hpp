// What every spectrum of core/motion/spectra starts from: oscillators of one freedom, and the ground they stand on.
//
//   u'' + 2 zeta omega u' + omega^2 u = -a_g(t),  omega = 2 pi / T,  at rest at t = 0
//   u: displacement relative to the ground; absolute acceleration u'' + a_g = -(2 zeta omega u' + omega^2 u)
//
// The ground is linear between samples. After the last sample it falls linearly to zero within one step and stays
// there, as core/motion/accelerogram.hpp has it.
//
// Step rule. An oscillator is seen at the ends of its steps only. Its step h is the record's step divided by
// m = ceil(n step / T), so that a period has at least n steps (StepRule). What lies between is missed: h^2 / 8 times
// the second derivative, which for a wave of the oscillator's own period is 1 - cos(pi / n) of a peak, 4.9 % at n = 10
// and 0.31 % at the usual n = 40. The archives of strong motion take n = 10 (CSMIP volume 3 agrees to its last digit
// then), which is why their spectra lie up to 4.6 % lower.
#pragma once

#include <span>
#include <string>

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// T = 0 is the rigid oscillator: it rides on the ground.
struct Oscillator {
  double period;         // s, 0 or at least the record's step / 100
  double damping_ratio;  // -, >= 0, < 1
};

// A view of an acceleration series, of the ground or of a floor. Whoever makes it keeps the samples alive.
struct Ground {
  std::span<const double> samples;  // m/s2, at least two, all finite
  double step;                      // s, > 0
  double first_sample_at = 0;       // s: 0, or one step (then the ground is at rest at t = 0)
};
Ground ground_of(const Accelerogram& record);

struct StepRule {
  double steps_per_period = 40;  // n, 10 to 1000
  // false: m is rounded up to 1, 2, 3, 4, 6, 8, 12, 16, ... so that more periods share a step and walk side by side.
  bool exact = false;
};
constexpr StepRule archive_rule{10, true};

// Throw Error (input) at `where` when something is not as described above.
void validate(const Ground& ground, const std::string& where);
void validate(std::span<const Oscillator> oscillators, double step, const std::string& where);
void validate(const StepRule& rule, const std::string& where);

// m of the step rule; 0 for the rigid oscillator, which needs no steps.
int subdivision(double period, double step, const StepRule& rule);

}  // namespace pilotis
