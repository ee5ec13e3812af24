// Discrete Fourier transform of real samples, by Eigen's FFT module (kissfft). Nothing else includes that module.
//
//     X_k = sum_n x_n exp(-2 pi i k n / N),   x_n = (1/N) sum_k X_k exp(2 pi i k n / N)
//
// Sizes whose only prime factors are 2, 3 and 5 are fast; a large prime factor p costs time in proportion to N p.
#pragma once

#include <complex>
#include <cstddef>
#include <span>
#include <vector>

namespace pilotis {

// X_k for k = 0 ... N/2 (N/2 + 1 values, rounded down); the rest is their conjugates. N = samples.size(), at least 1.
// In the unit of the samples.
std::vector<std::complex<double>> fourier_transform(std::span<const double> samples);

// The N samples again from k = 0 ... N/2. Of X_0, and of X_(N/2) when N is even, only the real part counts.
std::vector<double> inverse_fourier_transform(std::span<const std::complex<double>> half, std::size_t size);

// The least size >= `size` with no prime factor but 2, 3 and 5.
std::size_t fast_fourier_size(std::size_t size);

}  // namespace pilotis
