#include "core/motion/target/asce_7_16.hpp"

#include <fmt/format.h>

#include <array>
#include <limits>

#include "core/error.hpp"
#include "core/units/units.hpp"

namespace pilotis {

namespace {

constexpr double one_second = 1;  // S_D1 is the acceleration at 1 s
constexpr double mcer_factor = 1.5;

constexpr std::array<Parameter, 3> parameters{{
    {.key = "s_ds",
     .dimension = Dimension::acceleration,
     .meaning = "S_DS, design acceleration at short periods (the code's number in g)",
     .least = 0,
     .least_allowed = false},
    {.key = "s_d1",
     .dimension = Dimension::acceleration,
     .meaning = "S_D1, design acceleration at 1 s (the code's number in g)",
     .least = 0,
     .least_allowed = false},
    {.key = "t_l",
     .dimension = Dimension::time,
     .meaning = "T_L, long-period transition",
     .least = 0,
     .least_allowed = false},
}};

double design_acceleration(const Asce716Design& d, double T) {
  const double T_S = d.S_D1 * one_second / d.S_DS, T_0 = 0.2 * T_S;
  if (T < T_0) return d.S_DS * (0.4 + 0.6 * T / T_0);
  if (T <= T_S) return d.S_DS;
  return T <= d.T_L ? d.S_D1 * one_second / T : d.S_D1 * one_second * d.T_L / (T * T);
}

TargetSpectrum scaled(const Asce716Design& design, double factor, std::string_view clause) {
  return {fmt::format("ASCE/SEI 7-16, {}, S_DS {:g} g, S_D1 {:g} g, T_L {:g} s, damping 5 %", clause,
                      design.S_DS / standard_gravity, design.S_D1 / standard_gravity, design.T_L),
          0.05, 0, std::numeric_limits<double>::infinity(),
          [design, factor](double period) { return factor * design_acceleration(design, period); }};
}

}  // namespace

const Method Asce716Design::method{"asce_7_16_design", "ASCE/SEI 7-16, 11.4.6, design response spectrum", parameters};
const Method Asce716Mcer::method{
    "asce_7_16_mcer", "ASCE/SEI 7-16, 11.4.7, MCE_R response spectrum: 1.5 times that of 11.4.6", parameters};

Asce716Design Asce716Design::make(std::span<const double> values) {
  const Asce716Design design{values[0], values[1], values[2]};
  const double T_S = design.S_D1 * one_second / design.S_DS;
  if (design.T_L < T_S)
    throw input_error("t_l", fmt::format("found {:g} s", design.T_L),
                      fmt::format("it must be at least T_S = S_D1/S_DS = {:g} s", T_S));
  return design;
}
Asce716Mcer Asce716Mcer::make(std::span<const double> values) { return {Asce716Design::make(values)}; }

TargetSpectrum Asce716Design::spectrum() const { return scaled(*this, 1, "11.4.6, design response spectrum"); }
TargetSpectrum Asce716Mcer::spectrum() const {
  return scaled(design, mcer_factor, "11.4.7, MCE_R response spectrum (1.5 times the design spectrum of 11.4.6)");
}

}  // namespace pilotis
