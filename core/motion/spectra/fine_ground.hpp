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

  // Blocks from t = 0 until the ground is at rest again.
  long blocks() const { return (intervals_ + block_ - 1) / block_; }
  int longest_block() const { return static_cast<int>(block_ * pieces_); }  // steps
  // p, m/s2, [steps + 1]: both ends of the steps of block `number`. Good until the next call.
  std::span<const double> block(long number);

 private:
  double knot(long i) const;  // m/s2 at t = i steps of the record; 0 at the last

  Ground ground_;
  int pieces_;
  long lead_;       // 1 when the ground is at rest at t = 0 and the first sample follows one step later
  long intervals_;  // steps of the record, with those from rest and back to rest
  long block_;      // steps of the record in a block
  std::vector<double> weights_, buffer_;
};

}  // namespace pilotis
