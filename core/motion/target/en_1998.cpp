#include "core/motion/target/en_1998.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

namespace pilotis {

namespace {

constexpr double longest = 4;  // s, 3.2.2.2(1)P

constexpr std::array<std::string_view, 2> types{"1", "2"};                   // in the order of En1998Type
constexpr std::array<std::string_view, 5> grounds{"A", "B", "C", "D", "E"};  // in the order of En1998Ground

constexpr std::array<Parameter, 4> parameters{{
    {.key = "ag",
     .dimension = Dimension::acceleration,
     .meaning = "design ground acceleration on ground type A, gamma_I a_gR",
     .least = 0,
     .least_allowed = false},
    {.key = "type", .meaning = "type of the elastic spectrum", .choices = types},
    {.key = "ground", .meaning = "ground type", .choices = grounds},
    {.key = "damping", .meaning = "damping ratio, a fraction of critical", .otherwise = 0.05, .least = 0, .most = 1},
}};

// Table 3.2, type 1.
constexpr std::array<En1998Values, 5> table_3_2{{{1.0, 0.15, 0.4, 2.0},
                                                 {1.2, 0.15, 0.5, 2.0},
                                                 {1.15, 0.20, 0.6, 2.0},
                                                 {1.35, 0.20, 0.8, 2.0},
                                                 {1.4, 0.15, 0.5, 2.0}}};
// Table 3.3, type 2.
constexpr std::array<En1998Values, 5> table_3_3{{{1.0, 0.05, 0.25, 1.2},
                                                 {1.35, 0.05, 0.25, 1.2},
                                                 {1.5, 0.10, 0.25, 1.2},
                                                 {1.8, 0.10, 0.30, 1.2},
                                                 {1.6, 0.05, 0.25, 1.2}}};

// S_e / a_g.
double shape(const En1998Values& v, double eta, double T) {
  if (T < v.T_B) return v.S * (1 + T / v.T_B * (2.5 * eta - 1));
  const double plateau = v.S * 2.5 * eta;
  if (T <= v.T_C) return plateau;
  return T <= v.T_D ? plateau * v.T_C / T : plateau * v.T_C * v.T_D / (T * T);
}

}  // namespace

En1998Values en_1998_values(En1998Type type, En1998Ground ground) {
  return (type == En1998Type::type_1 ? table_3_2 : table_3_3).at(static_cast<std::size_t>(ground));
}

double en_1998_eta(double damping) { return std::max(std::sqrt(10 / (5 + 100 * damping)), 0.55); }

const Method En1998Elastic::method{"en_1998", "EN 1998-1:2004, 3.2.2.2, horizontal elastic spectrum", parameters};

En1998Elastic En1998Elastic::make(std::span<const double> values) {
  return {values[0], static_cast<En1998Type>(static_cast<int>(values[1])),
          static_cast<En1998Ground>(static_cast<int>(values[2])), values[3]};
}

TargetSpectrum En1998Elastic::spectrum() const {
  const En1998Values v = en_1998_values(type, ground);
  const double eta = en_1998_eta(damping);
  return {
      fmt::format("EN 1998-1:2004, 3.2.2.2, horizontal elastic spectrum type {}, ground {} (S {:g}, T_B {:g} s, T_C "
                  "{:g} s, T_D {:g} s, recommended values), a_g {:g} m/s2, damping {:g} %",
                  types[static_cast<std::size_t>(type)], grounds[static_cast<std::size_t>(ground)], v.S, v.T_B, v.T_C,
                  v.T_D, ag, 100 * damping),
      damping, 0, longest, [v, eta, ag = ag](double period) { return ag * shape(v, eta, period); }};
}

}  // namespace pilotis
