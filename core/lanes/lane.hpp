// The lane scalar: the hot path is written once over a type R that is either one double or a pack of doubles, one lane
// per run. Code over R has no branches on values; it selects. Includes no Eigen, so it can be compiled per processor.
#pragma once

#include <cmath>
#include <cstdint>
#include <type_traits>

namespace pilotis {

// GCC/Clang vector extensions of fixed width. Written out one by one: GCC drops a vector attribute that depends on a
// template parameter when the type is handed on to another template.
namespace lanes {
template <int W>
struct Vectors;
template <>
struct Vectors<2> {
  using Values [[gnu::vector_size(16)]] = double;
  using Bits [[gnu::vector_size(16)]] = std::int64_t;
};
template <>
struct Vectors<4> {
  using Values [[gnu::vector_size(32)]] = double;
  using Bits [[gnu::vector_size(32)]] = std::int64_t;
};
template <>
struct Vectors<8> {
  using Values [[gnu::vector_size(64)]] = double;
  using Bits [[gnu::vector_size(64)]] = std::int64_t;
};
}  // namespace lanes

// W doubles side by side, W = 2, 4 or 8: + - * / and comparisons work as they stand.
template <int W>
using Pack = typename lanes::Vectors<W>::Values;

// What a comparison of two R gives, and how many runs an R carries.
template <class R>
struct LaneTraits;

template <>
struct LaneTraits<double> {
  static constexpr int width = 1;
  using Mask = bool;
};

template <int W>
struct PackTraits {
  static constexpr int width = W;
  using Mask = typename lanes::Vectors<W>::Bits;
};

template <>
struct LaneTraits<Pack<2>> : PackTraits<2> {};
template <>
struct LaneTraits<Pack<4>> : PackTraits<4> {};
template <>
struct LaneTraits<Pack<8>> : PackTraits<8> {};

template <class R>
using Mask = typename LaneTraits<R>::Mask;

// One lane of R, to read or to write.
inline double& lane(double& x, int) { return x; }
inline double lane(const double& x, int) { return x; }
template <class P>
requires(LaneTraits<P>::width > 1) double lane(const P& x, int i) { return x[i]; }
template <class P>
requires(LaneTraits<P>::width > 1) void set_lane(P& x, int i, double value) { x[i] = value; }
inline void set_lane(double& x, int, double value) { x = value; }

// The same number in every lane.
template <class R>
R splat(double x) {
  return R{} + x;
}

// where ? yes : no, lane by lane.
inline double select(bool where, double yes, double no) { return where ? yes : no; }
template <class R>
requires(LaneTraits<R>::width > 1) R select(const Mask<R>& where, const R& yes, const R& no) {
  return where ? yes : no;
}

inline bool any(bool mask) { return mask; }
template <class M>
requires(!std::is_same_v<M, bool>) bool any(const M& mask) {
  std::int64_t bits = 0;
  for (unsigned i = 0; i < sizeof(M) / sizeof(std::int64_t); ++i) bits |= mask[i];
  return bits != 0;
}

inline bool all(bool mask) { return mask; }
template <class M>
requires(!std::is_same_v<M, bool>) bool all(const M& mask) {
  std::int64_t bits = -1;
  for (unsigned i = 0; i < sizeof(M) / sizeof(std::int64_t); ++i) bits &= mask[i];
  return bits != 0;
}

template <class R>
R lane_abs(const R& x) {
  return select(x < 0.0, R(-x), x);
}
template <class R>
R lane_min(const R& x, const R& y) {
  return select(x < y, x, y);
}
template <class R>
R lane_max(const R& x, const R& y) {
  return select(x > y, x, y);
}
// -1, 0 or 1.
template <class R>
R lane_sign(const R& x) {
  return select(x > 0.0, splat<R>(1), select(x < 0.0, splat<R>(-1), splat<R>(0)));
}

// x to the power n, x >= 0; exact products for n = 1 and 2, the usual choices.
template <class R>
R lane_power(const R& x, double n) {
  if (n == 1.0) return x;
  if (n == 2.0) return x * x;
  R y = x;
  for (int i = 0; i < LaneTraits<R>::width; ++i) set_lane(y, i, std::pow(lane(x, i), n));
  return y;
}

}  // namespace pilotis
