// The march of many oscillators over one ground, periods in lanes: written once over the lane scalar, compiled once per
// instruction set (spectra_kernels.cpp). No fused products, so a period has the same bits whatever its lane, its
// company, the width of the pack and the processor.
#pragma once

#include <cstring>

#include "core/lanes/lane.hpp"

namespace pilotis {

// Eight oscillators side by side, whatever the width of the machine's packs; whoever has fewer repeats one.
struct OscillatorBundle {
  static constexpr int lanes = 8;
  using Row = double[lanes];
  alignas(64) Row a_uu, a_uv, a_vu, a_vv, b_u0, b_u1, b_v0, b_v1;  // core/motion/spectra/recurrence.hpp
  alignas(64) Row damping, stiffness;                              // -2 zeta omega (1/s), -omega^2 (1/s2)
  alignas(64) Row u, v;                                            // m, m/s: the state between blocks
  alignas(64) Row u_low, u_high, v_low, v_high, a_low, a_high;     // m, m/s, m/s2: the extremes so far
};

namespace spectra {

template <class R>
R load(const double* from) {
  R x;
  std::memcpy(&x, from, sizeof(R));
  return x;
}
template <class R>
void store(double* to, const R& x) {
  std::memcpy(to, &x, sizeof(R));
}

// x in every lane. The compiler may leave out "- 0", but not the "0 +" of splat, which would turn -0 into 0.
template <class R>
R broadcast(double x) {
  return x - R{};
}

// One pack of oscillators and its exact step.
template <class R>
struct OscillatorPack {
  R a_uu, a_uv, a_vu, a_vv, b_u0, b_u1, b_v0, b_v1;
  R u, v;

  OscillatorPack(const OscillatorBundle& from, int at)
      : a_uu(load<R>(from.a_uu + at)),
        a_uv(load<R>(from.a_uv + at)),
        a_vu(load<R>(from.a_vu + at)),
        a_vv(load<R>(from.a_vv + at)),
        b_u0(load<R>(from.b_u0 + at)),
        b_u1(load<R>(from.b_u1 + at)),
        b_v0(load<R>(from.b_v0 + at)),
        b_v1(load<R>(from.b_v1 + at)),
        u(load<R>(from.u + at)),
        v(load<R>(from.v + at)) {}

  // The sums are grouped so that only two products and two sums wait for the step before.
  void advance(const R& p0, const R& p1) noexcept {
    const R u1 = a_uu * u + (a_uv * v + (b_u0 * p0 + b_u1 * p1));
    const R v1 = a_vu * u + (a_vv * v + (b_v0 * p0 + b_v1 * p1));
    u = u1;
    v = v1;
  }
};

template <class R>
struct ExtremesPack {
  R damping, stiffness, u_low, u_high, v_low, v_high, a_low, a_high;

  ExtremesPack(const OscillatorBundle& from, int at)
      : damping(load<R>(from.damping + at)),
        stiffness(load<R>(from.stiffness + at)),
        u_low(load<R>(from.u_low + at)),
        u_high(load<R>(from.u_high + at)),
        v_low(load<R>(from.v_low + at)),
        v_high(load<R>(from.v_high + at)),
        a_low(load<R>(from.a_low + at)),
        a_high(load<R>(from.a_high + at)) {}

  void see(const R& u, const R& v) noexcept {
    const R a = damping * v + stiffness * u;
    u_low = lane_min(u, u_low);
    u_high = lane_max(u, u_high);
    v_low = lane_min(v, v_low);
    v_high = lane_max(v, v_high);
    a_low = lane_min(a, a_low);
    a_high = lane_max(a, a_high);
  }
  void put(OscillatorBundle& to, int at) const noexcept {
    store(to.u_low + at, u_low);
    store(to.u_high + at, u_high);
    store(to.v_low + at, v_low);
    store(to.v_high + at, v_high);
    store(to.a_low + at, a_low);
    store(to.a_high + at, a_high);
  }
};

// Two packs at once: one hides the other's latency. ground: [steps + 1], m/s2.
template <class R>
void march_two(const double* ground, int steps, OscillatorBundle& first, int at, OscillatorBundle& second,
               int second_at) noexcept {
  OscillatorPack<R> x(first, at), y(second, second_at);
  ExtremesPack<R> x_seen(first, at), y_seen(second, second_at);
  R p0 = broadcast<R>(ground[0]);
  for (int i = 1; i <= steps; ++i) {
    const R p1 = broadcast<R>(ground[i]);
    x.advance(p0, p1);
    y.advance(p0, p1);
    x_seen.see(x.u, x.v);
    y_seen.see(y.u, y.v);
    p0 = p1;
  }
  store(first.u + at, x.u);
  store(first.v + at, x.v);
  x_seen.put(first, at);
  store(second.u + second_at, y.u);
  store(second.v + second_at, y.v);
  y_seen.put(second, second_at);
}

// All bundles over one block of ground: states and extremes go on from where they stand.
template <class R>
void march_extremes(const double* ground, int steps, OscillatorBundle* bundles, int count) noexcept {
  constexpr int width = LaneTraits<R>::width, packs = OscillatorBundle::lanes / width;
  for (int i = 0; i < count * packs; i += 2) {
    const int j = i + 1 < count * packs ? i + 1 : i;  // an odd pack out goes twice; both write the same
    march_two<R>(ground, steps, bundles[i / packs], i % packs * width, bundles[j / packs], j % packs * width);
  }
}

// One bundle over one block, displacements kept: u [steps][OscillatorBundle::lanes], m, at the end of every step.
template <class R>
void march_displacements(const double* ground, int steps, OscillatorBundle& bundle, double* u) noexcept {
  constexpr int width = LaneTraits<R>::width;
  for (int at = 0; at < OscillatorBundle::lanes; at += width) {
    OscillatorPack<R> x(bundle, at);
    R p0 = broadcast<R>(ground[0]);
    for (int i = 1; i <= steps; ++i) {
      const R p1 = broadcast<R>(ground[i]);
      x.advance(p0, p1);
      store(u + (i - 1) * OscillatorBundle::lanes + at, x.u);
      p0 = p1;
    }
    store(bundle.u + at, x.u);
    store(bundle.v + at, x.v);
  }
}

}  // namespace spectra

}  // namespace pilotis
