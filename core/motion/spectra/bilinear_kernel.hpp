// The march of bilinear oscillators over one ground, oscillators in lanes: written once over the lane scalar, compiled
// once per instruction set (spectra_kernels.cpp). No fused products: same bits in any lane, company and on any
// processor.
//
// Everything is in units of the yield displacement: x = u / u_y, and the spring is the law Bilinear{1, 1, r}.
//   x'' + 2 zeta omega x' + omega^2 (r x + (1 - r)(x - s)) = -a_g / u_y,   s: the slip that the law remembers
// is an elastic oscillator under a_g / u_y - omega^2 (1 - r) s. Between the ends of a step that load is taken linear,
// so a step without slip is exact (recurrence.hpp), and one with slip errs by the step squared. Where it slips forward,
// s1 = x1 - 1, which makes x1 the solution of a linear equation: no iteration. Backward alike.
#pragma once

#include "core/laws/bilinear.hpp"
#include "core/motion/spectra/oscillator_kernel.hpp"

namespace pilotis {

// Eight bilinear oscillators side by side; whoever has fewer repeats one.
struct BilinearBundle {
  static constexpr int lanes = OscillatorBundle::lanes;
  using Row = OscillatorBundle::Row;
  OscillatorBundle elastic;              // recurrence; u, v, u_low, u_high in units of u_y
  alignas(64) Row ground, pull, relief;  // 1 / u_y (1/m); omega^2 (1 - r); 1 / (1 + b_u1 pull)
  alignas(64) Row slip;                  // s between blocks
};

namespace spectra {

template <class R>
struct BilinearPack {
  OscillatorPack<R> elastic;
  R ground, pull, relief, low, high;
  Bilinear::Memory<R> memory;

  BilinearPack(const BilinearBundle& from, int at)
      : elastic(from.elastic, at),
        ground(load<R>(from.ground + at)),
        pull(load<R>(from.pull + at)),
        relief(load<R>(from.relief + at)),
        low(load<R>(from.elastic.u_low + at)),
        high(load<R>(from.elastic.u_high + at)),
        memory{load<R>(from.slip + at)} {}

  void put(BilinearBundle& to, int at) const noexcept {
    store(to.elastic.u + at, elastic.u);
    store(to.elastic.v + at, elastic.v);
    store(to.elastic.u_low + at, low);
    store(to.elastic.u_high + at, high);
    store(to.slip + at, memory.slip);
  }

  // a0, a1: the ground's acceleration at both ends, m/s2.
  void advance(const Bilinear& law, const R& a0, const R& a1) noexcept {
    const auto& e = elastic;
    const R held = pull * memory.slip, p0 = ground * a0 - held, p1 = ground * a1 - held;
    const R known_u = e.a_uu * e.u + (e.a_uv * e.v + e.b_u0 * p0),
            known_v = e.a_vu * e.u + (e.a_vv * e.v + e.b_v0 * p0);
    const R without_slip = known_u + e.b_u1 * p1;
    const R stretch = without_slip - memory.slip;
    const R beyond = stretch - lane_max<R>(lane_min<R>(stretch, splat<R>(1)), splat<R>(-1));
    const R x1 = without_slip + beyond * (relief - 1.0);
    Bilinear::Memory<R> next;
    reply(law, x1, e.v, memory, next);
    elastic.v = known_v + e.b_v1 * (ground * a1 - pull * next.slip);
    elastic.u = x1;
    memory = next;
    low = lane_min(x1, low);
    high = lane_max(x1, high);
  }
};

// ground: [steps + 1], m/s2. States and extremes go on from where they stand.
template <class R>
void march_bilinear(const double* ground, int steps, double post_yield_ratio, BilinearBundle& bundle) noexcept {
  const Bilinear law{1, 1, post_yield_ratio};
  constexpr int width = LaneTraits<R>::width;
  for (int at = 0; at < BilinearBundle::lanes; at += width) {
    BilinearPack<R> x(bundle, at);
    R a0 = splat<R>(ground[0]);
    for (int i = 1; i <= steps; ++i) {
      const R a1 = splat<R>(ground[i]);
      x.advance(law, a0, a1);
      a0 = a1;
    }
    x.put(bundle, at);
  }
}

}  // namespace spectra

}  // namespace pilotis
