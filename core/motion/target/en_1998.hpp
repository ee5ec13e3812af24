// Horizontal elastic response spectrum of EN 1998-1:2004, clause 3.2.2.2 (from memory).
//
//     0   <= T <= T_B:  S_e = a_g S (1 + T/T_B (2.5 eta - 1))
//     T_B <= T <= T_C:  S_e = a_g S 2.5 eta
//     T_C <= T <= T_D:  S_e = a_g S 2.5 eta T_C/T
//     T_D <= T <= 4 s:  S_e = a_g S 2.5 eta T_C T_D/T^2         eta = sqrt(10 / (5 + xi)) >= 0.55, xi in %
//
// S, T_B, T_C, T_D are the recommended values of tables 3.2 (type 1) and 3.3 (type 2); a National Annex may have
// others, which then make a table (table.hpp). Ground types S1 and S2 need a study of their own. a_g is the design
// ground acceleration on ground type A, gamma_I a_gR. Beyond 4 s the informative Annex A is not built in: refused.
#pragma once

#include "core/motion/target/target.hpp"
#include "core/parameter.hpp"

namespace pilotis {

enum class En1998Type { type_1, type_2 };  // type 2 is recommended where the surface-wave magnitude is at most 5.5
enum class En1998Ground { A, B, C, D, E };

struct En1998Values {
  double S = 1;                      // soil factor
  double T_B = 0, T_C = 0, T_D = 0;  // s
};
En1998Values en_1998_values(En1998Type type, En1998Ground ground);

// Damping correction factor, of the damping as a fraction of critical.
double en_1998_eta(double damping);

struct En1998Elastic {
  double ag = 0;  // m/s2, > 0
  En1998Type type = En1998Type::type_1;
  En1998Ground ground = En1998Ground::A;
  double damping = 0.05;  // fraction of critical, 0 to 1

  static const Method method;
  static En1998Elastic make(std::span<const double> values);
  TargetSpectrum spectrum() const;
};

}  // namespace pilotis
