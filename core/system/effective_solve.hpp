// The effective solve a scheme asks for: (M + c_c C + c_k K_tangent) x = b, with C's low-rank part by the
// Sherman-Morrison-Woodbury identity, so the band stays narrow. Over the lane scalar; allocates only when made.
#pragma once

#include <algorithm>
#include <vector>

#include "core/system/kernel.hpp"

namespace pilotis {

template <class R>
class EffectiveSolve {
 public:
  explicit EffectiveSolve(const System& system)
      : steady_(system.stiffness.entries.size()),
        band_(system.stiffness.entries.size()),
        solved_(system.modal_damping.weight.size() * system.freedoms),
        small_(system.modal_damping.weight.size() * system.modal_damping.weight.size()),
        amount_(system.modal_damping.weight.size()),
        tangent_(system.elements) {}

  // `tangent` [element]. Factors again only when a tangent or a coefficient has changed: never in a linear march of one
  // step, seldom while springs stay on their straight branches.
  void factor(const System& system, const R& c_c, const R& c_k, const R* tangent) noexcept {
    const bool same_step = all((c_c == c_c_) & (c_k == c_k_));
    if (same_step && same_tangents(tangent)) return;
    if (!same_step) steady_band(system, c_c, c_k, steady_.data());
    c_c_ = c_c, c_k_ = c_k;
    std::copy_n(tangent, tangent_.size(), tangent_.begin());
    std::copy(steady_.begin(), steady_.end(), band_.begin());
    add_tangents(system, c_k, tangent, band_.data());
    band_factor(band_.data(), system.freedoms, system.half);
    if (!amount_.empty()) factor_low_rank(system);
  }

  // x holds b on entry, [freedom].
  void solve(const System& system, R* x) const noexcept {
    band_solve(band_.data(), system.freedoms, system.half, x);
    if (!amount_.empty()) correct(system, x);
  }

 private:
  bool same_tangents(const R* tangent) const noexcept {
    for (std::size_t e = 0; e < tangent_.size(); ++e)
      if (!all(tangent[e] == tangent_[e])) return false;
    return true;
  }

  int rank() const { return static_cast<int>(amount_.size()); }

  // S = (c_c weight)^-1 + W^T A^-1 W, Cholesky-like LDL^T kept as a full band of half width rank - 1.
  void factor_low_rank(const System& system) noexcept {
    const int n = system.freedoms, r = rank();
    for (int j = 0; j < r; ++j) {
      R* column = &solved_[std::size_t(j) * n];
      for (int i = 0; i < n; ++i) column[i] = splat<R>(system.modal_damping.columns[j][i]);
      band_solve(band_.data(), n, system.half, column);
    }
    for (int j = 0; j < r; ++j) {
      for (int k = j; k < r; ++k)
        small_[std::size_t(j) * r + (k - j)] = product(system, k, &solved_[std::size_t(j) * n]);
      small_[std::size_t(j) * r] += 1.0 / (c_c_ * system.modal_damping.weight[j]);
    }
    band_factor(small_.data(), r, r - 1);
  }

  void correct(const System& system, R* x) const noexcept {
    const int n = system.freedoms, r = rank();
    for (int j = 0; j < r; ++j) amount_[j] = product(system, j, x);
    band_solve(small_.data(), r, r - 1, amount_.data());
    for (int j = 0; j < r; ++j)
      for (int i = 0; i < n; ++i) x[i] -= solved_[std::size_t(j) * n + i] * amount_[j];
  }

  R product(const System& system, int j, const R* x) const noexcept {
    R sum = splat<R>(0);
    for (int i = 0; i < system.freedoms; ++i) sum += system.modal_damping.columns[j][i] * x[i];
    return sum;
  }

  R c_c_ = splat<R>(-1), c_k_ = splat<R>(-1);  // of the factors; no step has negative ones
  std::vector<R> steady_, band_;
  std::vector<R> solved_;          // A^-1 W, [rank][freedom]
  std::vector<R> small_;           // factors of S
  mutable std::vector<R> amount_;  // scratch, [rank]
  std::vector<R> tangent_;         // of the factors, [element]
};

}  // namespace pilotis
