// Symmetric band matrices and their LDL^T factorisation, over the lane scalar. Part of the hot path: no Eigen here.
#pragma once

#include <algorithm>
#include <vector>

#include "core/lanes/lane.hpp"

namespace pilotis {

// Lower part by column: entry (i, j) with j <= i <= j + half stands at [j * (half + 1) + i - j].
struct Band {
  int n = 0;
  int half = 0;  // half band width: 0 is diagonal, 1 tridiagonal
  std::vector<double> entries;

  Band() = default;
  Band(int size, int half_width) : n(size), half(half_width), entries(std::size_t(size) * (half_width + 1), 0.0) {}

  std::size_t position(int i, int j) const {
    const int row = std::max(i, j), column = std::min(i, j);
    return std::size_t(column) * (half + 1) + (row - column);
  }
  void add(int i, int j, double value) { entries[position(i, j)] += value; }
  double at(int i, int j) const { return std::abs(i - j) > half ? 0.0 : entries[position(i, j)]; }
};

inline bool is_zero(const Band& a) {
  return std::all_of(a.entries.begin(), a.entries.end(), [](double x) { return x == 0; });
}

// y += A x of a tridiagonal matrix, n > 1: row by row, every y touched once. Adds in the order of the general path.
template <class R>
void tridiagonal_multiply_add(const Band& a, const R* x, R* y) noexcept {
  const double* column = a.entries.data();
  R above = splat<R>(0);  // what the row before leaves for this one
  for (int j = 0; j + 1 < a.n; ++j, column += 2) {
    y[j] = (y[j] + above) + (column[0] * x[j] + column[1] * x[j + 1]);
    above = column[1] * x[j];
  }
  y[a.n - 1] = (y[a.n - 1] + above) + column[0] * x[a.n - 1];
}

// y += A x; x and y [n], not the same.
template <class R>
void band_multiply_add(const Band& a, const R* x, R* y) noexcept {
  if (a.half == 1 && a.n > 1) return tridiagonal_multiply_add(a, x, y);
  const double* column = a.entries.data();
  for (int j = 0; j < a.n; ++j, column += a.half + 1) {
    const int below = std::min(a.half, a.n - 1 - j);
    R sum = column[0] * x[j];
    for (int k = 1; k <= below; ++k) {
      y[j + k] += column[k] * x[j];
      sum += column[k] * x[j + k];
    }
    y[j] += sum;
  }
}

namespace bands {

// Half is the half band width where it is known when compiling, -1 where it is not.
template <int Half, class R>
void factor(R* a, int n, int half) noexcept {
  const int h = Half >= 0 ? Half : half, stride = h + 1;
  for (int j = 0; j < n; ++j) {
    R* column = a + std::size_t(j) * stride;
    const R inverse = 1.0 / column[0];
    const int below = std::min(h, n - 1 - j);
    for (int k = 1; k <= below; ++k) {
      const R l = column[k] * inverse;
      R* other = a + std::size_t(j + k) * stride;
      for (int i = k; i <= below; ++i) other[i - k] -= l * column[i];
    }
    for (int k = 1; k <= below; ++k) column[k] *= inverse;
    column[0] = inverse;
  }
}

template <int Half, class R>
void solve(const R* a, int n, int half, R* x) noexcept {
  const int h = Half >= 0 ? Half : half, stride = h + 1;
  for (int j = 0; j < n; ++j) {
    const R* column = a + std::size_t(j) * stride;
    const int below = std::min(h, n - 1 - j);
    for (int k = 1; k <= below; ++k) x[j + k] -= column[k] * x[j];
  }
  for (int j = n - 1; j >= 0; --j) {
    const R* column = a + std::size_t(j) * stride;
    const int below = std::min(h, n - 1 - j);
    R value = x[j] * column[0];
    for (int k = 1; k <= below; ++k) value -= column[k] * x[j + k];
    x[j] = value;
  }
}

}  // namespace bands

// A = L D L^T in place (unit L below, 1/D on the diagonal: one reciprocal a pivot). Lanes whose pivot vanishes get
// non-finite values, which the finite check of the march catches.
template <class R>
void band_factor(R* a, int n, int half) noexcept {
  half == 1 ? bands::factor<1>(a, n, half) : bands::factor<-1>(a, n, half);
}

// Solves A x = b with the factors of band_factor; x holds b on entry, [n].
template <class R>
void band_solve(const R* a, int n, int half, R* x) noexcept {
  half == 1 ? bands::solve<1>(a, n, half, x) : bands::solve<-1>(a, n, half, x);
}

}  // namespace pilotis
