#include "core/motion/spectra/free_vibration.hpp"

#include <cmath>
#include <numbers>

namespace pilotis {

Swing free_vibration(const Oscillator& oscillator, double q0, double rate) {
  const double zeta = oscillator.damping_ratio, omega = 2 * std::numbers::pi / oscillator.period;
  const double root = std::sqrt(1 - zeta * zeta);
  const double damped = omega * root;
  // q' vanishes where tan(omega_d t) = rate omega_d / (omega^2 q0 + zeta omega rate).
  double angle = std::atan2(rate * root, omega * q0 + zeta * rate);
  if (angle <= 0) angle += std::numbers::pi;
  const double first =
      std::exp(-zeta / root * angle) * (q0 * std::cos(angle) + (rate + zeta * omega * q0) / damped * std::sin(angle));
  return {first, -first * std::exp(-zeta / root * std::numbers::pi), angle / damped};
}

}  // namespace pilotis
