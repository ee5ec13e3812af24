// Bouc-Wen, smooth hysteresis, without degradation:
//   f = r k d + (1 - r) f_y z,     u_y = f_y / k
//   u_y z' = A d' - beta |d'| |z|^(n-1) z - gamma d' |z|^n
// Parameters: k > 0 (N/m), f_y > 0 (N), r < 1 (post-yield ratio), exponent n >= 1, beta > 0, -beta <= gamma <= beta
// (outside this a closed loop can give energy back: Erlicher & Point 2004), A > 0. With A = 1 and beta + gamma = 1 the
// initial stiffness is k and |z| tends to 1; otherwise the initial stiffness is (r + (1 - r) A) k and z tends to
// (A / (beta + gamma))^(1/n).
// z is a function of the path of d alone. It is integrated along d by the classical fourth-order Runge-Kutta method, in
// strides set by the committed state (see longest_stride), the last one cut short: force and tangent are continuous in
// d. Sources: Bouc 1967; Wen, "Method for random vibration of hysteretic systems", J. Eng. Mech. 102 (1976) 249;
// Erlicher & Point, "Thermodynamic admissibility of Bouc-Wen type hysteresis models", C. R. Mecanique 332 (2004) 51.
#pragma once

#include <array>

#include "core/laws/law.hpp"

namespace pilotis {

struct BoucWen {
  static constexpr std::array parameters{
      Parameter{"stiffness", Dimension::stiffness, "the elastic stiffness", {}, 0.0, 1e300, false},
      Parameter{"yield_shear", Dimension::force, "the shear at yield", {}, 0.0, 1e300, false},
      Parameter{"post_yield_ratio", Dimension::none, "the post-yield over the elastic stiffness", 0.0, -1.0, 1.0, true,
                false},
      Parameter{"exponent", Dimension::none, "the exponent n (sharpness of the knee)", 1.0, 1.0, 20.0},
      Parameter{"beta", Dimension::none, "the shape parameter beta", 0.5, 0.0, 100.0, false},
      Parameter{"gamma", Dimension::none, "the shape parameter gamma", 0.5, -100.0, 100.0},
      Parameter{"A", Dimension::none, "the amplitude parameter A", 1.0, 0.0, 100.0, false}};
  static constexpr Method method{"bouc_wen", "Bouc-Wen, smooth hysteresis", parameters};

  double stiffness;         // N/m
  double yield_shear;       // N
  double post_yield_ratio;  // -
  double exponent;          // n, -
  double beta, gamma, A;    // -
  double loading_rate;      // -, from the others: |d(dz/dx)/dz| at the ultimate z, x = d/u_y: n (beta+gamma) z_u^(n-1)

  // Unchecked; input goes through make(). Same units as the fields.
  BoucWen(double k, double f_y, double r, double n, double beta_, double gamma_, double A_);

  template <class R>
  struct Memory {
    R z;            // -, hysteretic part
    R deformation;  // m, where z was reached
  };

  double yield_deformation() const { return yield_shear / stiffness; }  // m

  // Throws Error (input) when |gamma| > beta or the initial stiffness, (r + (1 - r) A) k, is not positive.
  static BoucWen make(std::span<const double> values);
  std::array<double, 7> values() const { return {stiffness, yield_shear, post_yield_ratio, exponent, beta, gamma, A}; }
};

namespace bouc_wen {

template <class R>
struct Slope {
  R value;       // dz/dx, x = d / u_y
  R derivative;  // of it with respect to z
};

// `direction` is the sign of d'.
template <class R>
Slope<R> slope(const BoucWen& law, const R& z, const R& direction) {
  const R size = lane_abs(z);
  const R lower = law.exponent == 1.0 ? splat<R>(1) : lane_power<R>(size, law.exponent - 1);  // |z|^(n-1)
  const R weight = law.gamma + law.beta * direction * lane_sign<R>(z);
  return {law.A - lower * size * weight, -law.exponent * lower * weight * lane_sign<R>(z)};
}

// One Runge-Kutta step of z over h (in x, signed) and dz/dh at its end.
template <class R>
Slope<R> stride(const BoucWen& law, const R& z, const R& h, const R& direction) {
  const auto k1 = slope(law, z, direction);
  const auto k2 = slope(law, R(z + 0.5 * h * k1.value), direction);
  const R k2_h = k2.derivative * 0.5 * k1.value;
  const auto k3 = slope(law, R(z + 0.5 * h * k2.value), direction);
  const R k3_h = k3.derivative * 0.5 * (k2.value + h * k2_h);
  const auto k4 = slope(law, R(z + h * k3.value), direction);
  const R k4_h = k4.derivative * (k3.value + h * k3_h);
  const R sum = k1.value + 2.0 * k2.value + 2.0 * k3.value + k4.value;
  return {z + h / 6.0 * sum, sum / 6.0 + h / 6.0 * (2.0 * k2_h + 2.0 * k3_h + k4_h)};
}

// The longest stride from z, in u_y: a quarter of the length over which z closes in on its course, where the method is
// stable and accurate; while |z| falls (dz/dx >= A then) at most to z = 0, where dz/dx has a kink.
template <class R>
R longest_stride(const BoucWen& law, const R& z, const R& direction) {
  const double n = law.exponent;
  const R size = lane_abs(z);
  const R unloading_rate = n * (law.beta - law.gamma) * (n == 1.0 ? splat<R>(1) : lane_power<R>(size, n - 1));
  const R to_zero = lane_max<R>(size / law.A, splat<R>(1e-6));
  const R loading = splat<R>(0.25 / law.loading_rate);  // infinite when gamma = -beta: then dz/dx = A
  return select(direction * z < 0.0, lane_min<R>(0.25 / unloading_rate, to_zero), loading);
}

// More strides than it takes from one ultimate value to the other, to 1e-17, for n up to 20.
inline constexpr int most_strides = 400;

}  // namespace bouc_wen

template <class R>
Reply<R> reply(const BoucWen& law, const R& deformation, const R&, const BoucWen::Memory<R>& committed,
               BoucWen::Memory<R>& trial) {
  const double u_y = law.yield_deformation();
  R left = (deformation - committed.deformation) / u_y;  // what is still to walk
  const R direction = lane_sign<R>(left);
  R z = committed.z;
  R longest = bouc_wen::longest_stride(law, z, direction);
  auto long_way = lane_abs(left) > longest;
  for (int i = 0; i < bouc_wen::most_strides && any(long_way); ++i) {
    const R h = select(long_way, R(longest * direction), splat<R>(0));
    z = bouc_wen::stride(law, z, h, direction).value;
    left = left - h;
    longest = bouc_wen::longest_stride(law, z, direction);
    long_way = lane_abs(left) > longest;
  }
  left = lane_min<R>(lane_max<R>(left, R(-longest)), longest);
  const auto last = bouc_wen::stride(law, z, left, direction);
  trial.z = last.value;
  trial.deformation = deformation;
  const double hysteretic = (1 - law.post_yield_ratio) * law.yield_shear;
  const double backbone = law.post_yield_ratio * law.stiffness;
  return {backbone * deformation + hysteretic * last.value, backbone + hysteretic / u_y * last.derivative};
}

inline double initial_stiffness(const BoucWen& law) {
  return (law.post_yield_ratio + (1 - law.post_yield_ratio) * law.A) * law.stiffness;
}
inline double yield_deformation(const BoucWen& law) { return law.yield_deformation(); }

// The hysteretic spring has the stiffness A f_y / u_y when it unloads, hence f_y u_y z^2 / (2 A).
template <class R>
R stored_energy(const BoucWen& law, const BoucWen::Memory<R>& memory, const R& deformation) {
  const double hysteretic = (1 - law.post_yield_ratio) * law.yield_shear * law.yield_deformation() / law.A;
  return 0.5 * law.post_yield_ratio * law.stiffness * deformation * deformation +
         0.5 * hysteretic * memory.z * memory.z;
}

// Work of the hysteretic force less what is stored: integral of z dx by the trapezoid rule with end correction
// (fourth order), the slopes taken along the path.
template <class R>
R dissipated_energy(const BoucWen& law, const BoucWen::Memory<R>& before, const BoucWen::Memory<R>& after) {
  const R x = (after.deformation - before.deformation) / law.yield_deformation();
  const R direction = lane_sign<R>(x);
  const R ends = bouc_wen::slope(law, before.z, direction).value - bouc_wen::slope(law, after.z, direction).value;
  const R work = 0.5 * x * (before.z + after.z) + x * x / 12.0 * ends;
  const R stored = 0.5 / law.A * (after.z * after.z - before.z * before.z);
  return (1 - law.post_yield_ratio) * law.yield_shear * law.yield_deformation() * (work - stored);
}

}  // namespace pilotis
