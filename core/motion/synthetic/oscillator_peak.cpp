#include "core/motion/synthetic/oscillator_peak.hpp"

#include <cmath>
#include <numbers>

namespace pilotis {

namespace {

// u'' + 2 zeta omega u' + omega^2 u = -a(t), marched over equal parts of a step with a linear in between.
class Oscillator {
 public:
  Oscillator(double omega, double zeta, double part) : omega_(omega), zeta_(zeta), part_(part) {
    const double damped = omega * std::sqrt(1 - zeta * zeta), decay = std::exp(-zeta * omega * part);
    const double c = std::cos(damped * part), s = std::sin(damped * part) / damped;
    uu_ = decay * (c + zeta * omega * s);
    uv_ = decay * s;
    vu_ = -decay * omega * omega * s;
    vv_ = decay * (c - zeta * omega * s);
  }

  // The free vibration about the particular solution -(a + slope t) / omega^2 + 2 zeta slope / omega^3.
  void march(double acceleration, double slope) {
    const double stiffness = omega_ * omega_;
    const double rest = -acceleration / stiffness + 2 * zeta_ * slope / (stiffness * omega_);
    const double drift = -slope / stiffness;
    const double u = u_ - rest, v = v_ - drift;
    u_ = uu_ * u + uv_ * v + rest + drift * part_;
    v_ = vu_ * u + vv_ * v + drift;
  }
  double displacement() const { return u_; }

 private:
  double omega_, zeta_, part_;
  double uu_ = 0, uv_ = 0, vu_ = 0, vv_ = 0;
  double u_ = 0, v_ = 0;
};

OscillatorPeak peak_at(const Accelerogram& record, double period, double damping) {
  const double omega = 2 * std::numbers::pi / period;
  const auto parts = static_cast<int>(std::ceil(10 * record.step / period));
  const double part = record.step / parts;
  Oscillator oscillator(omega, damping, part);
  double largest = 0, time = 0;
  for (std::size_t i = 0; i + 1 < record.samples.size(); ++i) {
    const double slope = (record.samples[i + 1] - record.samples[i]) / record.step;
    for (int k = 0; k < parts; ++k) {
      oscillator.march(record.samples[i] + slope * part * k, slope);
      if (std::abs(oscillator.displacement()) <= std::abs(largest)) continue;
      largest = oscillator.displacement();
      time = record.step * static_cast<double>(i) + part * (k + 1);
    }
  }
  return {omega * omega * largest, record.first_sample_at + time};
}

}  // namespace

std::vector<OscillatorPeak> oscillator_peaks(const Accelerogram& record, std::span<const double> periods,
                                             double damping) {
  std::vector<OscillatorPeak> peaks;
  for (double period : periods) peaks.push_back(peak_at(record, period, damping));
  return peaks;
}

std::vector<double> equal_ratios(double shortest, double longest, std::size_t count) {
  std::vector<double> periods(count);
  for (std::size_t i = 0; i < count; ++i)
    periods[i] = shortest * std::pow(longest / shortest, static_cast<double>(i) / static_cast<double>(count - 1));
  periods.back() = longest;
  return periods;
}

}  // namespace pilotis
