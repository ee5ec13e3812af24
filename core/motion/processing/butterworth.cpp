#include "core/motion/processing/butterworth.hpp"

#include <algorithm>
#include <cmath>
#include <complex>
#include <numbers>

namespace pilotis {

namespace {

using Complex = std::complex<double>;
constexpr double pi = std::numbers::pi;

// The prototype's poles (corner 1 rad/s) on or above the real axis; their conjugates are the others.
std::vector<Complex> prototype_poles(int order) {
  std::vector<Complex> poles;
  for (int k = 0; 2 * k + 1 < order; ++k) poles.push_back(std::polar(1.0, pi * (2 * k + order + 1) / (2.0 * order)));
  if (order % 2 == 1) poles.emplace_back(-1.0, 0.0);
  return poles;
}

double prewarped(double corner, double step) { return 2 / step * std::tan(pi * corner * step); }

Complex bilinear(Complex s, double step) { return (2.0 + s * step) / (2.0 - s * step); }

Complex response(const FilterSection& q, double frequency, double step) {
  const Complex delay = std::polar(1.0, -2 * pi * frequency * step);
  return (q.b0 + delay * (q.b1 + delay * q.b2)) / (1.0 + delay * (q.a1 + delay * q.a2));
}

// Zeros are given by b1 and b2 (with b0 = 1), poles by two of them; gain 1 at `frequency`.
FilterSection section(double b1, double b2, Complex pole, Complex other, double frequency, double step) {
  FilterSection q{1, b1, b2, -(pole + other).real(), (pole * other).real()};
  const double gain = std::abs(response(q, frequency, step));
  q.b0 /= gain;
  q.b1 /= gain;
  q.b2 /= gain;
  return q;
}

// Lowpass and highpass differ in the analog poles, the zeros (at z = -sign) and where the gain is 1.
template <class Pole>
std::vector<FilterSection> one_sided(int order, double sign, double unit_gain_at, double step, Pole analog) {
  std::vector<FilterSection> sections;
  for (const Complex& p : prototype_poles(order)) {
    const Complex z = bilinear(analog(p), step);
    if (p.imag() == 0)
      sections.push_back(section(sign, 0, z, 0, unit_gain_at, step));
    else
      sections.push_back(section(2 * sign, 1, z, std::conj(z), unit_gain_at, step));
  }
  return sections;
}

}  // namespace

std::vector<FilterSection> butterworth_lowpass(int order, double corner, double step) {
  const double w = prewarped(corner, step);
  return one_sided(order, 1, 0, step, [w](Complex p) { return p * w; });
}

std::vector<FilterSection> butterworth_highpass(int order, double corner, double step) {
  const double w = prewarped(corner, step);
  return one_sided(order, -1, 0.5 / step, step, [w](Complex p) { return w / p; });
}

std::vector<FilterSection> butterworth_bandpass(int order, double low, double high, double step) {
  // Each section is given the gain 1 at the center, so all together have it, which is where the filter's largest is.
  const double w1 = prewarped(low, step), w2 = prewarped(high, step);
  const double center = std::atan(std::sqrt(w1 * w2) * step / 2) / (pi * step);  // Hz, the digital center
  std::vector<FilterSection> sections;
  for (const Complex& p : prototype_poles(order)) {
    const Complex half = p * (w2 - w1) / 2.0;
    const Complex root = std::sqrt(half * half - w1 * w2);
    const Complex first = bilinear(half + root, step), second = bilinear(half - root, step);
    if (p.imag() == 0) {
      sections.push_back(section(0, -1, first, second, center, step));
    } else {
      sections.push_back(section(0, -1, first, std::conj(first), center, step));
      sections.push_back(section(0, -1, second, std::conj(second), center, step));
    }
  }
  return sections;
}

void filter_forward(std::span<const FilterSection> sections, std::span<double> samples) noexcept {
  for (const FilterSection& q : sections) {
    double first = 0, second = 0;  // what earlier samples still contribute
    for (double& sample : samples) {
      const double x = sample;
      sample = q.b0 * x + first;
      first = q.b1 * x - q.a1 * sample + second;
      second = q.b2 * x - q.a2 * sample;
    }
  }
}

void filter_both_ways(std::span<const FilterSection> sections, std::span<double> samples) noexcept {
  filter_forward(sections, samples);
  std::reverse(samples.begin(), samples.end());
  filter_forward(sections, samples);
  std::reverse(samples.begin(), samples.end());
}

double filter_gain(std::span<const FilterSection> sections, double frequency, double step) {
  double gain = 1;
  for (const FilterSection& q : sections) gain *= std::abs(response(q, frequency, step));
  return gain;
}

}  // namespace pilotis
