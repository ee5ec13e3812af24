// Horizontal spectra of ASCE/SEI 7-16, 5 % damped: the design response spectrum of 11.4.6 and the risk-targeted maximum
// considered earthquake (MCE_R) spectrum of 11.4.7, 1.5 times as large (from memory).
//
//     T < T_0:           S_a = S_DS (0.4 + 0.6 T/T_0)            T_0 = 0.2 S_D1/S_DS
//     T_0 <= T <= T_S:   S_a = S_DS                              T_S = S_D1/S_DS
//     T_S < T <= T_L:    S_a = S_D1/T
//     T_L < T:           S_a = S_D1 T_L/T^2
//
// S_DS, S_D1 and T_L are the site's and come from the user. Where the code asks for a site-specific procedure, so does
// a table (table.hpp).
#pragma once

#include "core/motion/target/target.hpp"
#include "core/parameter.hpp"

namespace pilotis {

struct Asce716Design {
  double S_DS = 0;  // m/s2, > 0: the code's number times g
  double S_D1 = 0;  // m/s2, > 0: the code's number times g
  double T_L = 0;   // s, > 0, at least T_S

  static const Method method;
  static Asce716Design make(std::span<const double> values);  // throws when T_L is below T_S
  TargetSpectrum spectrum() const;
};

struct Asce716Mcer {
  Asce716Design design;

  static const Method method;
  static Asce716Mcer make(std::span<const double> values);
  TargetSpectrum spectrum() const;
};

}  // namespace pilotis
