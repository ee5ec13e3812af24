#include "core/motion/fft.hpp"

#include <unsupported/Eigen/FFT>

namespace pilotis {

namespace {

bool only_small_factors(std::size_t size) {
  for (const std::size_t factor : {2, 3, 5})
    while (size % factor == 0) size /= factor;
  return size == 1;
}

}  // namespace

std::vector<std::complex<double>> fourier_transform(std::span<const double> samples) {
  Eigen::FFT<double> fft;
  std::vector<std::complex<double>> spectrum(samples.size());
  fft.fwd(spectrum.data(), samples.data(), static_cast<Eigen::Index>(samples.size()));
  spectrum.resize(samples.size() / 2 + 1);
  return spectrum;
}

std::vector<double> inverse_fourier_transform(std::span<const std::complex<double>> half, std::size_t size) {
  std::vector<std::complex<double>> whole(size), back(size);
  whole[0] = half[0].real();
  for (std::size_t k = 1; 2 * k < size; ++k) {
    whole[k] = half[k];
    whole[size - k] = std::conj(half[k]);
  }
  if (size % 2 == 0) whole[size / 2] = half[size / 2].real();
  Eigen::FFT<double> fft;
  fft.inv(back.data(), whole.data(), static_cast<Eigen::Index>(size));
  std::vector<double> samples(size);
  for (std::size_t n = 0; n < size; ++n) samples[n] = back[n].real();
  return samples;
}

std::size_t fast_fourier_size(std::size_t size) {
  while (!only_small_factors(size)) ++size;
  return size;
}

}  // namespace pilotis
