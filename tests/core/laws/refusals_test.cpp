// Parameters out of their range, for every law of the list. The ranges are the laws' own; that the messages name key,
// value and range is the house rule.
#include <gtest/gtest.h>

#include <cmath>
#include <limits>

#include "core/error.hpp"
#include "core/laws/registry.hpp"

namespace pilotis {
namespace {

// Numbers every law of the list takes, by key.
double fair_value(const Parameter& p) {
  if (p.key == "cracking_shear") return 4e5;
  if (p.dimension == Dimension::force) return 1e6;
  if (p.dimension == Dimension::stiffness) return 1e8;
  if (p.otherwise) return *p.otherwise;
  return 0.5 * (p.least + p.most);
}

std::vector<double> fair_values(const Method& method) {
  std::vector<double> values;
  for (const Parameter& p : method.parameters) values.push_back(fair_value(p));
  return values;
}

void expect_taken(const Method& method, std::size_t i, double value) {
  std::vector<double> values = fair_values(method);
  values[i] = value;
  EXPECT_NO_THROW(make_law(method.name, values, "spring"))
      << method.name << "." << method.parameters[i].key << " = " << value;
}

// Key in the place, value in the problem, range in the remedy.
void expect_refused(const Method& method, std::size_t i, double value, const std::string& found,
                    const std::string& range) {
  std::vector<double> values = fair_values(method);
  values[i] = value;
  const std::string key(method.parameters[i].key);
  try {
    make_law(method.name, values, "spring");
    FAIL() << method.name << "." << key << " = " << value << " was taken";
  } catch (const Error& e) {
    EXPECT_EQ(e.kind(), ErrorKind::input);
    EXPECT_EQ(e.where(), "spring." + key);
    EXPECT_NE(e.problem().find(found), std::string::npos) << e.what();
    EXPECT_NE(e.remedy().find(range), std::string::npos) << e.what();
  }
}

std::string printed(double value) {
  char text[40];
  std::snprintf(text, sizeof text, "%g", value);
  return text;
}

double beyond(double bound, double direction) { return bound + direction * std::max(1.0, std::abs(bound)) * 0.25; }

TEST(Refusals, FairValuesAreTaken) {
  for (const Method& method : law_catalogue())
    EXPECT_NO_THROW(make_law(method.name, fair_values(method), "spring")) << method.name;
}

TEST(Refusals, EveryLowerBoundHolds) {
  for (const Method& method : law_catalogue())
    for (std::size_t i = 0; i < method.parameters.size(); ++i) {
      const Parameter& p = method.parameters[i];
      if (!std::isfinite(p.least)) continue;
      const std::string range = (p.least_allowed ? "at least " : "greater than ") + printed(p.least);
      const double outside = beyond(p.least, -1);
      expect_refused(method, i, outside, printed(outside), range);
      if (!p.least_allowed) expect_refused(method, i, p.least, printed(p.least), range);
    }
}

TEST(Refusals, EveryUpperBoundHolds) {
  for (const Method& method : law_catalogue())
    for (std::size_t i = 0; i < method.parameters.size(); ++i) {
      const Parameter& p = method.parameters[i];
      if (p.most >= 1e300) continue;  // no bound but that of doubles
      const std::string range = (p.most_allowed ? "at most " : "less than ") + printed(p.most);
      const double outside = beyond(p.most, 1);
      expect_refused(method, i, outside, printed(outside), range);
      if (!p.most_allowed) expect_refused(method, i, p.most, printed(p.most), range);
    }
}

TEST(Refusals, WhatIsNotFiniteIsRefused) {
  for (const Method& method : law_catalogue())
    for (std::size_t i = 0; i < method.parameters.size(); ++i) {
      expect_refused(method, i, std::numeric_limits<double>::quiet_NaN(), "nan", "finite");
      expect_refused(method, i, std::numeric_limits<double>::infinity(), "inf", "finite");
    }
}

TEST(Refusals, UnknownLawNamesTheKnownOnes) {
  try {
    make_law("bilinera", {}, "story[2].spring");
    FAIL();
  } catch (const Error& e) {
    EXPECT_EQ(e.where(), "story[2].spring");
    EXPECT_NE(e.problem().find("bilinera"), std::string::npos);
    for (const Method& method : law_catalogue()) EXPECT_NE(e.remedy().find(method.name), std::string::npos);
  }
}

// Trilinear: cracking comes before yielding, and each slope is lower than the one before.
TEST(Refusals, TrilinearYieldsAfterItCracks) {
  const Method& method = Trilinear::method;
  expect_refused(method, 3, 4e5, "400000", "greater than cracking_shear, 400000 N");
  expect_refused(method, 3, 3e5, "300000", "greater than cracking_shear, 400000 N");
  expect_taken(method, 3, 4.1e5);
}

TEST(Refusals, TrilinearSoftensAfterItYields) {
  const Method& method = Trilinear::method;  // cracked ratio 0.5
  expect_refused(method, 4, 0.5, "0.5", "less than cracked_ratio, 0.5");
  expect_refused(method, 4, 0.7, "0.7", "less than cracked_ratio, 0.5");
  expect_taken(method, 4, 0.49);
  expect_taken(method, 4, 0.0);
  expect_taken(method, 4, -0.2);
}

// Erlicher & Point, C. R. Mecanique 332 (2004) 51 (from memory): -beta <= gamma <= beta.
TEST(Refusals, BoucWenGammaLiesBetweenMinusBetaAndBeta) {
  const Method& method = BoucWen::method;  // beta 0.5
  for (const double gamma : {-0.5, 0.0, 0.5}) expect_taken(method, 5, gamma);
  for (const double gamma : {-0.51, 0.51})
    expect_refused(method, 5, gamma, printed(gamma), "between -beta and beta, 0.5");
}

// By hand: r + (1 - r) A > 0, so A > 1/3 for r = -0.5.
TEST(Refusals, BoucWenStartsWithAPositiveStiffness) {
  std::vector<double> values = fair_values(BoucWen::method);
  values[2] = -0.5;
  values[6] = 0.34;
  EXPECT_NO_THROW(make_law("bouc_wen", values, "spring"));
  values[6] = 0.33;
  try {
    make_law("bouc_wen", values, "spring");
    FAIL();
  } catch (const Error& e) {
    EXPECT_EQ(e.where(), "spring.A");
    EXPECT_NE(e.problem().find("0.33"), std::string::npos) << e.what();
    EXPECT_NE(e.remedy().find("greater than 0.333333"), std::string::npos) << e.what();
  }
}

}  // namespace
}  // namespace pilotis
