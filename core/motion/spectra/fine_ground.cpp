#include "core/motion/spectra/fine_ground.hpp"

#include <algorithm>

namespace pilotis {

namespace {

constexpr long steps_in_a_block = 512;  // 4 kB of ground beside the oscillators

}  // namespace

FineGround::FineGround(const Ground& ground, int pieces)
    : ground_(ground),
      pieces_(pieces),
      lead_(ground.first_sample_at == 0 ? 0 : 1),
      intervals_(lead_ + static_cast<long>(ground.samples.size())),
      block_(std::max(1L, steps_in_a_block / pieces)),
      buffer_(static_cast<std::size_t>(block_ * pieces + 1)) {
  for (int j = 1; j <= pieces; ++j) weights_.push_back(static_cast<double>(j) / pieces);
}

double FineGround::knot(long i) const {
  const long sample = i - lead_;
  return sample < 0 || sample >= static_cast<long>(ground_.samples.size()) ? 0.0 : ground_.samples[sample];
}

// Weighted so that a sample itself comes out to the bit.
std::span<const double> FineGround::block(long number) {
  const long first = number * block_, last = std::min(first + block_, intervals_);
  double* out = buffer_.data();
  double from = knot(first);
  *out++ = from;
  for (long i = first + 1; i <= last; ++i) {
    const double to = knot(i);
    for (const double weight : weights_) *out++ = (1 - weight) * from + weight * to;
    from = to;
  }
  return {buffer_.data(), out};
}

}  // namespace pilotis
