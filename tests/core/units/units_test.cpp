// Factors are those of NIST Special Publication 811 (2008 edition), appendix B.8 (alphabetical list), from memory; B.8
// prints seven significant digits and marks exact ones in bold. The tolerance is half a unit of the last printed digit.
#include "core/units/units.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <thread>
#include <vector>

#include "core/error.hpp"

namespace pilotis {
namespace {

struct Printed {
  const char* unit;
  Dimension dimension;
  double factor;     // to SI
  double tolerance;  // relative
};

constexpr double exact = 1e-15;        // exact by definition: rounding of doubles only
constexpr double seven_digits = 5e-7;  // half a unit of the seventh digit, at worst

const std::vector<Printed> printed{
    {"m", Dimension::length, 1, exact},
    {"mm", Dimension::length, 1e-3, exact},
    {"in", Dimension::length, 0.0254, exact},  // SP 811 B.8: inch, 2.54 E-02
    {"ft", Dimension::length, 0.3048, exact},  // foot, 3.048 E-01
    {"s", Dimension::time, 1, exact},
    {"ms", Dimension::time, 1e-3, exact},
    {"kg", Dimension::mass, 1, exact},
    {"t", Dimension::mass, 1000, exact},  // ton, metric, 1.0 E+03
    {"Mg", Dimension::mass, 1000, exact},
    {"lb", Dimension::mass, 0.45359237, exact},                       // pound (avoirdupois), 4.535924 E-01
    {"slug", Dimension::mass, 14.59390, seven_digits},                // slug, 1.459390 E+01
    {"kip s2/in", Dimension::mass, 4448.2216152605 / 0.0254, exact},  // kip over inch
    {"kN s2/m", Dimension::mass, 1000, exact},
    {"tf s2/m", Dimension::mass, 9806.65, exact},
    {"N", Dimension::force, 1, exact},
    {"kN", Dimension::force, 1e3, exact},
    {"MN", Dimension::force, 1e6, exact},
    {"kgf", Dimension::force, 9.80665, exact},          // kilogram-force, 9.80665 E+00
    {"tf", Dimension::force, 9806.65, exact},           // 1000 of it
    {"lbf", Dimension::force, 4.448222, seven_digits},  // pound-force, 4.448222 E+00
    {"lb", Dimension::force, 4.448222, seven_digits},
    {"kip", Dimension::force, 4448.222, seven_digits},  // kip, 4.448222 E+03
    {"kips", Dimension::force, 4448.222, seven_digits},
    {"N/m", Dimension::stiffness, 1, exact},
    {"kN/m", Dimension::stiffness, 1e3, exact},
    {"kN/mm", Dimension::stiffness, 1e6, exact},
    {"kip/in", Dimension::stiffness, 1000 * 175.1268, seven_digits},  // pound-force per inch, 1.751268 E+02
    {"lb/in", Dimension::stiffness, 175.1268, seven_digits},
    {"lbf/ft", Dimension::stiffness, 14.59390, seven_digits},  // pound-force per foot, 1.459390 E+01
    {"tf/cm", Dimension::stiffness, 980665, exact},
    {"kN s/m", Dimension::dashpot, 1e3, exact},
    {"kN*s/m", Dimension::dashpot, 1e3, exact},
    {"kN-s/m", Dimension::dashpot, 1e3, exact},
    {"kip s/in", Dimension::dashpot, 1000 * 175.1268, seven_digits},
    {"cm/s", Dimension::velocity, 0.01, exact},
    {"in/s", Dimension::velocity, 0.0254, exact},    // inch per second, 2.54 E-02
    {"g", Dimension::acceleration, 9.80665, exact},  // acceleration of free fall, standard, 9.80665
    {"G", Dimension::acceleration, 9.80665, exact},
    {"gal", Dimension::acceleration, 0.01, exact},  // gal, 1.0 E-02
    {"Gal", Dimension::acceleration, 0.01, exact},
    {"GAL", Dimension::acceleration, 0.01, exact},
    {"m/s2", Dimension::acceleration, 1, exact},
    {"m/s^2", Dimension::acceleration, 1, exact},
    {"cm/s2", Dimension::acceleration, 0.01, exact},
    {"cm/s/s", Dimension::acceleration, 0.01, exact},
    {"cm/sec2", Dimension::acceleration, 0.01, exact},
    {"cm/sec/sec", Dimension::acceleration, 0.01, exact},
    {"CM/SEC/SEC", Dimension::acceleration, 0.01, exact},
    {"CM/S2", Dimension::acceleration, 0.01, exact},
    {"mm/s2", Dimension::acceleration, 1e-3, exact},
    {"g/10", Dimension::acceleration, 0.980665, exact},
    {"in/s2", Dimension::acceleration, 0.0254, exact},  // inch per second squared, 2.54 E-02
    {"ft/s2", Dimension::acceleration, 0.3048, exact},  // foot per second squared, 3.048 E-01
    {"kN m", Dimension::moment, 1e3, exact},
    {"lbf ft", Dimension::moment, 1.355818, seven_digits},          // pound-force foot, 1.355818 E+00
    {"kip in", Dimension::moment, 1000 * 0.1129848, seven_digits},  // pound-force inch, 1.129848 E-01
    {"1/s", Dimension::per_time, 1, exact},
    {"Hz", Dimension::frequency, 1, exact},
    {"kHz", Dimension::frequency, 1000, exact},
    {"bar", Dimension::stress, 1e5, exact},                // bar, 1.0 E+05
    {"ksi", Dimension::stress, 6.894757e6, seven_digits},  // kip per square inch, 6.894757 E+06
    {"g/cm3", Dimension::density, 1000, exact},            // gram per cubic centimeter, 1.0 E+03
    {"s/km", Dimension::slowness, 1e-3, exact},
    {"cm2/s3", Dimension::spectral_density, 1e-4, exact},
    {"%", Dimension::none, 0.01, exact},
    {"1", Dimension::none, 1, exact},
    {" kN ", Dimension::force, 1e3, exact},
};

TEST(Units, FactorsAreThoseOfNistSp811) {
  for (const Printed& p : printed) {
    ASSERT_TRUE(is_unit_of(p.unit, p.dimension)) << p.unit;
    EXPECT_NEAR(si_factor(p.unit, p.dimension, "here"), p.factor, p.tolerance * p.factor) << p.unit;
  }
}

struct Wrong {
  const char* unit;
  Dimension dimension;
  const char* said;  // in the message
};

TEST(Units, SaysWhatWasFoundAndWhatIsAllowed) {
  const std::vector<Wrong> wrong{
      {"kN", Dimension::length, "not a unit of length"},
      {"kg", Dimension::force, "not a unit of force"},
      {"g", Dimension::force, "not a unit of force"},
      {"mm/kN", Dimension::stiffness, "not a unit of stiffness"},  // the reciprocal is not the thing
      {"s", Dimension::per_time, "not a unit of rate"},
      {"s", Dimension::frequency, "not a unit of frequency"},
      {"rad/s", Dimension::frequency, "not a unit of frequency"},  // wrong by 2 pi
      {"rpm", Dimension::frequency, "not a unit of frequency"},
      {"degC", Dimension::length, "not a unit of length"},
      {"furlongish", Dimension::length, "unknown unit"},
      {"KN", Dimension::force, "unknown unit"},
      {"", Dimension::force, "unknown unit"},
      {"2 kN", Dimension::force, "unknown unit"},  // a number is not part of a unit's name
      {"ton", Dimension::mass, "different things"},
      {"ton/in", Dimension::stiffness, "different things"},
      {"cm/s", Dimension::acceleration, "not a unit of acceleration"},
  };
  for (const Wrong& w : wrong) {
    EXPECT_FALSE(is_unit_of(w.unit, w.dimension)) << w.unit;
    try {
      si_factor(w.unit, w.dimension, "study.toml:3: units.force");
      FAIL() << w.unit;
    } catch (const Error& e) {
      EXPECT_EQ(e.kind(), ErrorKind::input);
      EXPECT_EQ(e.where(), "study.toml:3: units.force");
      EXPECT_NE(e.problem().find(w.said), std::string::npos) << e.what();
      EXPECT_NE(e.problem().find(w.unit), std::string::npos) << e.what();
      EXPECT_NE(e.remedy().find("such as"), std::string::npos) << e.what();
    }
  }
}

TEST(Units, EveryDimensionsSiUnitHasFactorOne) {
  for (int i = 0; i <= static_cast<int>(Dimension::spectral_density); ++i) {
    const auto dimension = static_cast<Dimension>(i);
    EXPECT_EQ(si_factor(si_unit(dimension), dimension, "here"), 1.0) << si_unit(dimension);
    EXPECT_FALSE(dimension_name(dimension).empty());
  }
}

TEST(Units, PrintsNothingItself) {
  testing::internal::CaptureStderr();
  EXPECT_FALSE(is_unit_of("no such unit", Dimension::force));
  EXPECT_FALSE(is_unit_of("kN/", Dimension::force));
  EXPECT_EQ(testing::internal::GetCapturedStderr(), "");
}

TEST(Units, ManyThreadsMayAsk) {
  std::vector<double> found(8);
  std::vector<std::thread> threads;
  for (std::size_t t = 0; t < found.size(); ++t)
    threads.emplace_back([&found, t] {
      for (int i = 0; i < 200; ++i) found[t] += si_factor("kN/mm", Dimension::stiffness, "here");
    });
  for (std::thread& thread : threads) thread.join();
  for (double sum : found) EXPECT_DOUBLE_EQ(sum, 200e6);
}

}  // namespace
}  // namespace pilotis
