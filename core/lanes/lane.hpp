// The lane scalar: the hot path is written once over a type R that is either one double or a pack of doubles, one lane
// per run. Code over R has no branches on values; it selects. Includes no Eigen, so it can be compiled per processor.
#pragma once

#include <cmath>
#include <cstdint>
#include <type_traits>

#if defined(__AVX__)
#include <immintrin.h>
#endif

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
requires(std::is_same_v<R, Pack<LaneTraits<R>::width>>) R select(const Mask<R>& where, const R& yes, const R& no) {
  return where ? yes : no;
}

// A mask with every lane set, and one lane of a mask.
template <class R>
Mask<R> every_lane() {
  return R{} == R{};
}
inline bool flag(bool mask, int) { return mask; }
template <class M>
requires(!std::is_arithmetic_v<M>) bool flag(const M& mask, int i) { return mask[i] != 0; }
inline void set_flag(bool& mask, int, bool value) { mask = value; }
template <class M>
requires(!std::is_arithmetic_v<M>) void set_flag(M& mask, int i, bool value) { mask[i] = value ? -1 : 0; }

inline bool negated(bool mask) { return !mask; }
template <class M>
requires(!std::is_arithmetic_v<M>) M negated(const M& mask) { return ~mask; }

inline bool any(bool mask) { return mask; }
template <class M>
requires(!std::is_arithmetic_v<M>) bool any(const M& mask) {
#if defined(__AVX__)
  if constexpr (sizeof(M) == 32) return _mm256_movemask_pd(__m256d(mask)) != 0;
#endif
#if defined(__AVX512F__)
  if constexpr (sizeof(M) == 64) return _mm512_test_epi64_mask(__m512i(mask), __m512i(mask)) != 0;
#endif
  std::int64_t bits = 0;
  for (unsigned i = 0; i < sizeof(M) / sizeof(std::int64_t); ++i) bits |= mask[i];
  return bits != 0;
}

inline bool all(bool mask) { return mask; }
template <class M>
requires(!std::is_arithmetic_v<M>) bool all(const M& mask) { return !any(~mask); }

// |x|, of zeros and NaN too by clearing the sign.
template <class R>
R lane_abs(const R& x) {
  constexpr std::int64_t all_but_sign = 0x7fffffffffffffff;
  if constexpr (LaneTraits<R>::width == 1)
    return std::fabs(x);
  else
    return R(Mask<R>(x) & (Mask<R>{} + all_but_sign));
}

// The second where neither is smaller (larger): what the processors' own instructions do.
template <class R>
R lane_min(const R& x, const R& y) {
#if defined(__AVX__)
  if constexpr (sizeof(R) == 32) return R(_mm256_min_pd(__m256d(x), __m256d(y)));
#endif
#if defined(__AVX512F__)
  if constexpr (sizeof(R) == 64) return R(_mm512_min_pd(__m512d(x), __m512d(y)));
#endif
  return select(x < y, x, y);
}
template <class R>
R lane_max(const R& x, const R& y) {
#if defined(__AVX__)
  if constexpr (sizeof(R) == 32) return R(_mm256_max_pd(__m256d(x), __m256d(y)));
#endif
#if defined(__AVX512F__)
  if constexpr (sizeof(R) == 64) return R(_mm512_max_pd(__m512d(x), __m512d(y)));
#endif
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
