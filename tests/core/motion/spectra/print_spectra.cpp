// Peaks of oscillators as scipy_spectra.py asks for them: reads from standard input
//   step  steps_per_period  post_yield_ratio  number of samples  number of oscillators
//   the samples (m/s2, the first at t = 0), then per oscillator: period (s), damping ratio, yield acceleration (m/s2;
//   0: elastic)
// and prints per oscillator: max |u| (m), max |u'| (m/s), max |absolute acceleration| (m/s2); of yielding ones max |u|,
// ductility and residual (m).
#include <cmath>
#include <cstdio>
#include <iostream>
#include <vector>

#include "core/motion/spectra/bilinear_peaks.hpp"
#include "core/motion/spectra/oscillator_extremes.hpp"

using namespace pilotis;

namespace {

void print_elastic(const Ground& ground, const Oscillator& oscillator, const StepRule& rule) {
  OscillatorExtremes seen;
  oscillator_extremes(ground, {&oscillator, 1}, rule, {&seen, 1}, "standard input");
  std::printf("%.17g %.17g %.17g\n", seen.displacement.largest(), seen.velocity.largest(), seen.acceleration.largest());
}

void print_yielding(const Ground& ground, double r, const BilinearOscillator& oscillator, const StepRule& rule) {
  BilinearPeak peak;
  bilinear_peaks(ground, r, {&oscillator, 1}, {&peak, 1}, "standard input", rule);
  std::printf("%.17g %.17g %.17g\n", std::abs(peak.displacement), peak.ductility, peak.residual);
}

}  // namespace

int main() {
  double step, r;
  StepRule rule;
  std::size_t samples, oscillators;
  std::cin >> step >> rule.steps_per_period >> r >> samples >> oscillators;
  std::vector<double> motion(samples);
  for (double& a : motion) std::cin >> a;
  for (std::size_t i = 0; i < oscillators; ++i) {
    BilinearOscillator o;
    std::cin >> o.period >> o.damping_ratio >> o.yield_acceleration;
    if (!std::cin) return 2;
    if (o.yield_acceleration == 0)
      print_elastic({motion, step}, {o.period, o.damping_ratio}, rule);
    else
      print_yielding({motion, step}, r, o, rule);
  }
}
