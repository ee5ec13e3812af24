// Target spectra at their corner periods, by hand from the clauses (from memory, see tests/reference/PROVENANCE.md).
#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/target/asce_7_16.hpp"
#include "core/motion/target/en_1998.hpp"
#include "core/motion/target/registry.hpp"
#include "core/motion/target/table.hpp"

namespace pilotis {
namespace {

constexpr double g = 9.80665;

struct Row {
  En1998Type type;
  En1998Ground ground;
  double S, T_B, T_C, T_D;
};

using enum En1998Ground;
constexpr auto type_1 = En1998Type::type_1, type_2 = En1998Type::type_2;

// EN 1998-1:2004, tables 3.2 and 3.3.
constexpr Row rows[] = {{type_1, A, 1.0, 0.15, 0.4, 2.0},   {type_1, B, 1.2, 0.15, 0.5, 2.0},
                        {type_1, C, 1.15, 0.20, 0.6, 2.0},  {type_1, D, 1.35, 0.20, 0.8, 2.0},
                        {type_1, E, 1.4, 0.15, 0.5, 2.0},   {type_2, A, 1.0, 0.05, 0.25, 1.2},
                        {type_2, B, 1.35, 0.05, 0.25, 1.2}, {type_2, C, 1.5, 0.10, 0.25, 1.2},
                        {type_2, D, 1.8, 0.10, 0.30, 1.2},  {type_2, E, 1.6, 0.05, 0.25, 1.2}};

TEST(En1998, OrdinatesAtTheCornersOfEveryGround) {
  for (const Row& row : rows) {
    const TargetSpectrum s = En1998Elastic{2.0, row.type, row.ground, 0.05}.spectrum();
    EXPECT_DOUBLE_EQ(s.acceleration(0), 2 * row.S);
    EXPECT_DOUBLE_EQ(s.acceleration(row.T_B / 2), 2 * row.S * 1.75);
    EXPECT_DOUBLE_EQ(s.acceleration(row.T_B), 5 * row.S);
    EXPECT_DOUBLE_EQ(s.acceleration(row.T_C), 5 * row.S);
    EXPECT_DOUBLE_EQ(s.acceleration(row.T_D), 5 * row.S * row.T_C / row.T_D);
    EXPECT_DOUBLE_EQ(s.acceleration(4), 5 * row.S * row.T_C * row.T_D / 16);
    for (const double corner : {row.T_B, row.T_C, row.T_D})  // no jumps; slopes there are below 100 m/s2 per s
      EXPECT_NEAR(s.acceleration(corner * (1 - 1e-9)), s.acceleration(corner * (1 + 1e-9)), 1e-6);
  }
}

// By hand, a_g = 0.25 g, type 1, ground C, 5 %: plateau 0.25 * 1.15 * 2.5 = 0.71875 g; at 1 s times 0.6; at 3 s times
// 0.6 * 2 / 9; displacement from T_D on 0.025 a_g S T_C T_D g = 0.0846 m (rounded 10 / (4 pi^2) = 0.2533 to 0.25
// there).
TEST(En1998, OneByHand) {
  const TargetSpectrum s = En1998Elastic{0.25 * g, type_1, C, 0.05}.spectrum();
  EXPECT_DOUBLE_EQ(s.acceleration(0.3) / g, 0.71875);
  EXPECT_DOUBLE_EQ(s.acceleration(1) / g, 0.43125);
  EXPECT_DOUBLE_EQ(s.acceleration(3) / g, 0.71875 * 1.2 / 9);
  EXPECT_NEAR(s.displacement(3), 0.71875 * g * 1.2 / (4 * std::numbers::pi * std::numbers::pi), 1e-12);
  EXPECT_DOUBLE_EQ(s.displacement(2.5), s.displacement(3.5));
  EXPECT_EQ(
      s.description(),
      "EN 1998-1:2004, 3.2.2.2, horizontal elastic spectrum type 1, ground C (S 1.15, T_B 0.2 s, T_C 0.6 s, T_D 2 "
      "s, recommended values), a_g 2.45166 m/s2, damping 5 %");
}

TEST(En1998, DampingCorrectionHasAFloor) {
  EXPECT_DOUBLE_EQ(en_1998_eta(0.05), 1);
  EXPECT_DOUBLE_EQ(en_1998_eta(0.02), std::sqrt(10.0 / 7));
  EXPECT_DOUBLE_EQ(en_1998_eta(0.20), std::sqrt(0.4));
  EXPECT_DOUBLE_EQ(en_1998_eta(0.28), std::sqrt(10.0 / 33));  // 0.5505; the floor holds from 28.06 % on
  EXPECT_EQ(en_1998_eta(0.29), 0.55);
  EXPECT_EQ(en_1998_eta(0.50), 0.55);
  const TargetSpectrum s = En1998Elastic{1, type_1, A, 0.5}.spectrum();
  EXPECT_DOUBLE_EQ(s.acceleration(0.3), 2.5 * 0.55);
  EXPECT_DOUBLE_EQ(s.acceleration(0), 1);  // rigid: damping does not matter
}

TEST(En1998, RefusesBeyondFourSeconds) {
  const TargetSpectrum s = En1998Elastic{1, type_1, A, 0.05}.spectrum();
  EXPECT_NO_THROW(s.acceleration(4));
  try {
    s.acceleration(4.01);
    FAIL();
  } catch (const Error& e) {
    EXPECT_NE(std::string(e.what()).find("asked for at 4.01 s; it is defined from 0 to 4 s: EN 1998-1:2004"),
              std::string::npos)
        << e.what();
  }
}

// S_DS = 1.0 g, S_D1 = 0.6 g, T_L = 8 s: T_0 = 0.12 s, T_S = 0.6 s.
TEST(Asce716, OrdinatesAtTheCorners) {
  const TargetSpectrum s = Asce716Design{g, 0.6 * g, 8}.spectrum();
  const TargetSpectrum mcer = Asce716Mcer{{g, 0.6 * g, 8}}.spectrum();
  const double expected[][2] = {{0, 0.4}, {0.06, 0.7}, {0.12, 1}, {0.6, 1}, {1, 0.6}, {8, 0.075}, {16, 0.6 * 8 / 256}};
  for (const auto& [period, acceleration] : expected) {
    EXPECT_NEAR(s.acceleration(period) / g, acceleration, 1e-14) << period;
    EXPECT_NEAR(mcer.acceleration(period) / g, 1.5 * acceleration, 1e-14) << period;
  }
  EXPECT_EQ(s.description(),
            "ASCE/SEI 7-16, 11.4.6, design response spectrum, S_DS 1 g, S_D1 0.6 g, T_L 8 s, damping 5 %");
  EXPECT_TRUE(mcer.description().starts_with("ASCE/SEI 7-16, 11.4.7, MCE_R"));
}

TEST(TargetTable, InterpolatesInLogarithmsAndRefusesOutside) {
  TargetTable table{{0.1, 0.4, 1.6}, {2, 8, 2}, 0.05, Between::log_log, "invented"};
  const TargetSpectrum s = target_from(table, "table");
  EXPECT_EQ(s.acceleration(0.1), 2);
  EXPECT_EQ(s.acceleration(1.6), 2);
  EXPECT_DOUBLE_EQ(s.acceleration(0.2), 4);  // slope 1, then -1, in logarithms
  EXPECT_DOUBLE_EQ(s.acceleration(0.8), 4);
  EXPECT_THROW(s.acceleration(0.0999), Error);
  EXPECT_THROW(s.acceleration(1.61), Error);
  EXPECT_EQ(s.description(), "table of 3 periods from 0.1 to 1.6 s, log-log between them, damping 5 %; invented");
  table.between = Between::linear;
  EXPECT_DOUBLE_EQ(target_from(table, "table").acceleration(0.2), 4);  // 2 + 6 / 3
  EXPECT_DOUBLE_EQ(target_from(table, "table").acceleration(0.8), 6);
}

TEST(TargetTable, RefusesWhatIsNoTable) {
  const auto refused = [](const TargetTable& table) { EXPECT_THROW(target_from(table, "table"), Error); };
  const double nan = std::numeric_limits<double>::quiet_NaN();
  refused({{0.1}, {1}, 0.05, Between::log_log, "x"});
  refused({{0.1, 0.2}, {1}, 0.05, Between::log_log, "x"});
  refused({{0.2, 0.1}, {1, 1}, 0.05, Between::log_log, "x"});
  refused({{0.1, 0.1}, {1, 1}, 0.05, Between::log_log, "x"});
  refused({{0, 0.1}, {1, 1}, 0.05, Between::log_log, "x"});
  refused({{0.1, 0.2}, {1, 0}, 0.05, Between::log_log, "x"});
  refused({{0.1, 0.2}, {1, nan}, 0.05, Between::log_log, "x"});
  refused({{0.1, 0.2}, {1, 1}, -0.05, Between::log_log, "x"});
  refused({{0.1, 0.2}, {1, 1}, 0.05, Between::log_log, ""});
  EXPECT_NO_THROW(target_from({{0, 0.1}, {1, 1}, 0.05, Between::linear, "x"}, "table"));
}

TEST(Targets, AreMadeByName) {
  const TargetSpectrum s = make_target("en_1998", std::vector{3.0, 1.0, 3.0, 0.05}, "target");
  EXPECT_DOUBLE_EQ(s.acceleration(0.2), 3 * 1.8 * 2.5);  // type 2, ground D
  EXPECT_DOUBLE_EQ(make_target("asce_7_16_mcer", std::vector{g, 0.6 * g, 8.0}, "target").acceleration(0.3), 1.5 * g);
  const auto refused = [](std::string_view name, const std::vector<double>& values, const std::string& start) {
    try {
      make_target(name, values, "target");
      ADD_FAILURE() << start;
    } catch (const Error& e) {
      EXPECT_EQ(std::string(e.what()).substr(0, start.size()), start);
    }
  };
  refused("en_1998", {0, 0, 0, 0.05}, "target.ag: found 0 m/s2");
  refused("en_1998", {1, 0, 5, 0.05}, "target.ground: found 5; ground type must be one of A, B, C, D, E");
  refused("en_1998", {1}, "target: found 1 values");
  refused("asce_7_16_design", {g, 0.6 * g, 0.5},
          "target.t_l: found 0.5 s; it must be at least T_S = S_D1/S_DS = 0.6 s");
  refused("en_1999", {}, "target: there is no target spectrum \"en_1999\"");
}

TEST(Targets, EveryDescriptionNamesItsEdition) {
  for (const Method& method : target_catalogue()) {
    std::vector<double> values;
    for (const Parameter& parameter : method.parameters)
      values.push_back(parameter.otherwise.value_or(parameter.choices.empty() ? 1.0 : 0.0));
    const std::string description = make_target(method.name, values, "target").description();
    EXPECT_TRUE(description.find(":2004") != std::string::npos || description.find("7-16") != std::string::npos);
  }
}

}  // namespace
}  // namespace pilotis
