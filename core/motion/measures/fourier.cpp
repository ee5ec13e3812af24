#include "core/motion/measures/fourier.hpp"

#include <algorithm>
#include <cmath>

#include "core/motion/fft.hpp"

namespace pilotis {

namespace {

double konno_ohmachi_weight(double frequency, double center, double b) {
  const double x = b * std::log10(frequency / center);
  return std::abs(x) < 1e-9 ? 1 : std::pow(std::sin(x) / x, 4);
}

}  // namespace

FourierAmplitudes fourier_amplitudes(const Accelerogram& record, double spacing) {
  const double wanted = std::ceil(1 / (spacing * record.step) * (1 - 1e-12));
  const std::size_t size = fast_fourier_size(std::max(record.samples.size(), static_cast<std::size_t>(wanted)));
  std::vector<double> samples = record.samples;
  samples.resize(size, 0.0);
  FourierAmplitudes spectrum;
  for (const std::complex<double>& value : fourier_transform(samples)) {
    const auto place = static_cast<double>(spectrum.frequencies.size());
    spectrum.frequencies.push_back(place / (static_cast<double>(size) * record.step));
    spectrum.amplitudes.push_back(record.step * std::abs(value));
  }
  return spectrum;
}

FourierAmplitudes smoothed(const FourierAmplitudes& spectrum, double b) {
  FourierAmplitudes out = spectrum;
  for (std::size_t center = 1; center < spectrum.frequencies.size(); ++center) {
    double sum = 0, weights = 0;
    for (std::size_t i = 1; i < spectrum.frequencies.size(); ++i) {
      const double weight = konno_ohmachi_weight(spectrum.frequencies[i], spectrum.frequencies[center], b);
      sum += weight * spectrum.amplitudes[i];
      weights += weight;
    }
    out.amplitudes[center] = sum / weights;
  }
  return out;
}

double mean_period(const Accelerogram& record) {
  constexpr double lowest = 0.25, highest = 20, spacing = 0.05;  // Hz
  constexpr double last_bit = 1e-12;                             // a frequency at an end counts
  const FourierAmplitudes spectrum = fourier_amplitudes(record, spacing);
  double sum = 0, weights = 0;
  for (std::size_t i = 0; i < spectrum.frequencies.size(); ++i) {
    const double f = spectrum.frequencies[i];
    if (f < lowest * (1 - last_bit) || f > highest * (1 + last_bit)) continue;
    const double square = spectrum.amplitudes[i] * spectrum.amplitudes[i];
    sum += square / f;
    weights += square;
  }
  return weights > 0 ? sum / weights : 0;
}

}  // namespace pilotis
