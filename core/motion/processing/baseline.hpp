// baseline: a polynomial of low order, fitted to ground velocity or displacement, is taken out of the motion.
//
//     a(t) - sum_k c_k t^k;   the c_k make the sum of squares over the samples least of
//     velocity:      v(t) - sum_k c_k V_k(t),   V_k = integral of t^k,         k = 0 ... order - 1
//     displacement:  d(t) - sum_k c_k D_k(t),   D_k = double integral of t^k,  k = 0 ... order - 2
//
// What is subtracted from the acceleration is thus the first or second derivative of a polynomial of the stated order
// that is zero at t = 0 (a displacement's with zero slope), the ground being at rest there: the corrected motion still
// starts from rest. v, d, V_k and D_k are integrated alike (histories.hpp), so that a motion that is such a polynomial
// is removed to rounding at any step. Common practice; one of the first is Berg & Housner 1961, Bulletin of the
// Seismological Society of America 51, 175 (a parabola for the acceleration).
#pragma once

#include "core/motion/processing/step.hpp"

namespace pilotis {

struct PolynomialBaseline {
  enum class Fit { velocity, displacement };
  Fit fit = Fit::velocity;
  int order = 3;  // of the polynomial fitted: 1 to 8 for velocity, 2 to 8 for displacement

  static const Method method;
  static PolynomialBaseline make(std::span<const double> values);  // throws when fit and order do not go together
  Processed applied(const Accelerogram& record) const;
};

}  // namespace pilotis
