// The ground at an even fraction of its own step, block by block, so that a block stays in the fastest cache while
// every oscillator that needs this fraction walks over it.
#pragma once

#include <vector>

#include "core/motion/spectra/oscillator.hpp"

namespace pilotis {

class FineGround {
 public:
  // Every step of `ground` in `pieces` equal parts. The ground is viewed, not copied.
  FineGround(const Ground& ground, int pieces);

  double step() const { return ground_.step / pieces_; }  // s

  // Calls use(const double* p, int steps) for one block after the other from t = 0 until the ground is at rest again;
  // p[0..steps], m/s2, holds both ends of the steps.
  template <class Use>
  void each_block(Use&& use) {
    for (long first = 0; first < intervals_; first += block_) {
      const long count = first + block_ < intervals_ ? block_ : intervals_ - first;
      fill(first, count);
      use(buffer_.data(), static_cast<int>(count * pieces_));
    }
  }

 private:
  double knot(long i) const;  // m/s2 at t = i steps of the record; 0 at the last
  void fill(long first, long count);

  Ground ground_;
  int pieces_;
  long lead_;       // 1 when the ground is at rest at t = 0 and the first sample follows one step later
  long intervals_;  // steps of the record, with those from rest and back to rest
  long block_;      // steps of the record in a block
  std::vector<double> weights_, buffer_;
};

}  // namespace pilotis
