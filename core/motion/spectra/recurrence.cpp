#include "core/motion/spectra/recurrence.hpp"

#include <numbers>

namespace pilotis {

namespace {

// g', g, G and GG in the time tau = omega t.
struct ImpulseResponse {
  double rate = 0, itself = 0, integral = 0, twice = 0;
};

// g = sum c_k tau^k / k!, c_0 = 0, c_1 = 1, c_(k+2) = -2 zeta c_(k+1) - c_k, from the equation of motion. |c_k| <= k
// for zeta < 1, so at tau <= 2 pi / 10 the terms left out after k = 22 are below 1e-24 of the first.
ImpulseResponse impulse_response(double zeta, double tau) {
  ImpulseResponse sum;
  double before = 0, c = 1;
  double term = 1;  // tau^(k-1) / (k-1)!
  for (int k = 1; k <= 22; ++k) {
    sum.rate += c * term;
    sum.itself += c * term * tau / k;
    sum.integral += c * term * tau / k * tau / (k + 1);
    sum.twice += c * term * tau / k * tau / (k + 1) * tau / (k + 2);
    term *= tau / k;
    const double next = -2 * zeta * c - before;
    before = c;
    c = next;
  }
  return sum;
}

}  // namespace

Recurrence recurrence(const Oscillator& oscillator, double step) {
  const double omega = 2 * std::numbers::pi / oscillator.period, tau = omega * step;
  const ImpulseResponse g = impulse_response(oscillator.damping_ratio, tau);
  Recurrence r;
  r.omega = omega;
  r.a_uu = 1 - g.integral;
  r.a_uv = g.itself / omega;
  r.a_vu = -omega * g.itself;
  r.a_vv = g.rate;
  r.b_u0 = -(g.integral - g.twice / tau) / (omega * omega);
  r.b_u1 = -g.twice / tau / (omega * omega);
  r.b_v0 = -(g.itself - g.integral / tau) / omega;
  r.b_v1 = -g.integral / tau / omega;
  return r;
}

}  // namespace pilotis
