// Every processing step against closed forms and against what its header promises.
#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/measures/intensity.hpp"
#include "core/motion/processing/histories.hpp"
#include "core/motion/processing/registry.hpp"
#include "core/motion/processing/rotate.hpp"

namespace pilotis {
namespace {

constexpr double pi = std::numbers::pi;
constexpr double eps = std::numeric_limits<double>::epsilon();

Processed run(std::string_view name, const std::vector<double>& values, const Accelerogram& record) {
  return process(make_process_step(name, values, "study.toml:3: process[1]"), record);
}

// where() and what() of the refusal; empty when there was none.
std::string refusal(std::string_view name, const std::vector<double>& values, const Accelerogram& record) {
  try {
    run(name, values, record);
  } catch (const Error& e) {
    EXPECT_EQ(e.kind(), ErrorKind::input);
    EXPECT_FALSE(e.remedy().empty());
    return e.what();
  }
  return "";
}

void expect_refused(std::string_view name, const std::vector<double>& values, const Accelerogram& record,
                    const std::string& start) {
  EXPECT_EQ(refusal(name, values, record).substr(0, start.size()), start);
}

Accelerogram shaking(double first_sample_at = 0) {
  Accelerogram record{0.01, first_sample_at, {}};
  for (int i = 0; i < 1200; ++i)
    record.samples.push_back(std::sin(pi * i / 1200) * (std::sin(0.11 * i) + 0.4 * std::cos(0.37 * i)) + 0.05);
  return record;
}

// Values for each step that any record of a few seconds takes.
std::vector<double> usual(std::string_view name) {
  if (name == "baseline") return {0, 3};
  if (name == "taper") return {0.5, 1, 0};
  if (name == "pad") return {0, 0, 0.5, 4};
  if (name == "bandpass") return {0.5, 20, 4, 0};
  if (name == "highpass") return {0.5, 4, 0};
  if (name == "lowpass") return {20, 4, 1};
  if (name == "resample") return {0.005, 0};
  if (name == "trim") return {0.05, 0.95, 0.5, 0.5};
  if (name == "scale") return {2, 0, 0, 0, 0, 0, 0};
  return {};
}

TEST(EveryStep, IsPureSaysWhatItDidAndGivesAValidRecord) {
  EXPECT_EQ(process_catalogue().size(), 11u);
  for (const Method& method : process_catalogue())
    for (const double first : {0.0, 0.01}) {
      const Accelerogram record = shaking(first);
      ASSERT_EQ(usual(method.name).size(), method.parameters.size()) << method.name;
      const Processed once = run(method.name, usual(method.name), record);
      EXPECT_EQ(record.samples, shaking(first).samples) << method.name;
      EXPECT_EQ(once.record.samples, run(method.name, usual(method.name), record).record.samples) << method.name;
      EXPECT_NE(once.record.samples, record.samples) << method.name;
      EXPECT_TRUE(once.done.starts_with(std::string(method.name) + ": ")) << once.done;
      EXPECT_EQ(once.done.find('\n'), std::string::npos);
      EXPECT_NO_THROW(validate(once.record, "")) << method.name;
    }
}

// All steps are linear but trim's choice of a window and scale's to a measure: k times the record, k times the result.
TEST(EveryStep, IsHomogeneous) {
  Accelerogram record = shaking(), twice = record;
  for (double& sample : twice.samples) sample *= 2;  // exact, so all that follows is exactly twice as large
  for (const Method& method : process_catalogue()) {
    const auto one = run(method.name, usual(method.name), record).record.samples;
    const auto two = run(method.name, usual(method.name), twice).record.samples;
    ASSERT_EQ(one.size(), two.size());
    for (std::size_t i = 0; i < one.size(); ++i) ASSERT_EQ(two[i], 2 * one[i]) << method.name;
  }
}

TEST(EveryStep, RefusesValuesOutOfRangeByKey) {
  const Accelerogram record = shaking();
  expect_refused("bandpass", {-1, 20, 4, 0}, record, "study.toml:3: process[1].low: found -1 Hz");
  expect_refused("bandpass", {1, 20, 2.5, 0}, record, "study.toml:3: process[1].order: found 2.5");
  expect_refused("bandpass", {1, 20, 4, 2}, record, "study.toml:3: process[1].pass: found 2");
  expect_refused("bandpass", {20, 1, 4, 0}, record, "study.toml:3: process[1].low: found 20 Hz");
  expect_refused("bandpass", {1, 50, 4, 0}, record, "study.toml:3: process[1].high: found 50 Hz for a record");
  expect_refused("lowpass", {60, 4, 0}, record, "study.toml:3: process[1].corner: found 60 Hz for a record");
  expect_refused("highpass", {0, 4, 0}, record, "study.toml:3: process[1].corner: found 0 Hz");
  expect_refused("baseline", {1, 1}, record, "study.toml:3: process[1].order: found 1 for a displacement");
  expect_refused("baseline", {0, 3}, {0.01, 0, {1, 2}}, "study.toml:3: process[1].order: found order 3");
  expect_refused("taper", {0, 0, 0}, record, "study.toml:3: process[1]: found neither");
  expect_refused("taper", {1, 0, 0.1}, record, "study.toml:3: process[1]: found both");
  expect_refused("taper", {8, 8, 0}, record, "study.toml:3: process[1]: found tapers of 8 s and 8 s");
  expect_refused("pad", {1, 0, 0.1, 4}, record, "study.toml:3: process[1]: found both");
  expect_refused("pad", {1e9, 0, 0, 4}, record, "study.toml:3: process[1]: found 1e+09 s of zeros");
  expect_refused("trim", {0.9, 0.1, 0, 0}, record, "study.toml:3: process[1].from: found 0.9");
  expect_refused("trim", {0.1, 0.9, 0, 0}, {0.01, 0, {0, 0, 0}}, "study.toml:3: process[1]: found a record of zeros");
  expect_refused("scale", {0, 0, 0, 0, 0, 0, 0}, record, "study.toml:3: process[1]: found nothing");
  expect_refused("scale", {1, 3, 0, 0, 0, 0, 0}, record, "study.toml:3: process[1]: found factor and pga");
  expect_refused("scale", {0, 3, 0, 0, 0, 0, 0}, {0.01, 0, {0, 0}}, "study.toml:3: process[1].pga: the record's peak");
  expect_refused("remove_mean", {1}, record, "study.toml:3: process[1]: found 1 values");
  expect_refused("shake", {}, record, "study.toml:3: process[1]: there is no processing step \"shake\"");
}

TEST(MeanAndTrend, AreTakenOutExactly) {
  Accelerogram line{0.01, 0, {}};
  for (int i = 0; i < 1001; ++i) line.samples.push_back(0.3 - 0.002 * i);
  for (const double sample : run("remove_trend", {}, line).record.samples) EXPECT_NEAR(sample, 0, 1001 * eps);
  EXPECT_EQ(run("remove_trend", {}, line).done, "remove_trend: line from 0.3 to -1.7 m/s2 subtracted");
  EXPECT_EQ(run("remove_mean", {}, {0.1, 0, {1, 2, 6}}).record.samples, (std::vector<double>{-2, -1, 3}));
  EXPECT_EQ(run("remove_mean", {}, {0.1, 0, {1, 2, 6}}).done, "remove_mean: 3 m/s2 subtracted");
}

// A constant a gives v = a t and d = a t^2 / 2; a line b t gives b t^2 / 2 and b t^3 / 6, at any step.
TEST(Histories, AreExactForStraightLines) {
  const Accelerogram ramp{0.5, 0.5, {1, 2, 3, 4}};  // a = 2 t to t = 2, then back to 0 at 2.5
  EXPECT_EQ(acceleration_history(ramp), (std::vector<double>{0, 1, 2, 3, 4, 0}));
  const auto v = velocity_history(ramp), d = displacement_history(ramp);
  ASSERT_EQ(v.size(), 6u);
  ASSERT_EQ(d.size(), 6u);
  for (int i = 0; i < 5; ++i) {
    const double t = 0.5 * i;
    EXPECT_DOUBLE_EQ(v[i], t * t);
    EXPECT_NEAR(d[i], t * t * t / 3, 10 * eps);
  }
  EXPECT_DOUBLE_EQ(v[5], 4 + 1.0);                             // plus the triangle 4 * 0.5 / 2
  EXPECT_NEAR(d[5], 8.0 / 3 + 4 * 0.5 + 4 * 0.25 / 3, 1e-14);  // v step + a step^2 / 3 while a falls to 0
}

TEST(Baseline, PolynomialMotionIsRemovedToRounding) {
  for (const double first : {0.0, 0.02})
    for (int order = 1; order <= 8; ++order) {
      Accelerogram record{0.02, first, {}};
      for (int i = 0; i < 1500; ++i) {
        double sum = 0;
        for (int k = 0; k < order; ++k) sum += std::pow(-0.7, k) * std::pow(i / 1500.0, k);
        record.samples.push_back(sum);
      }
      // Rounding of 1500 sums, times the condition of the polynomials up to s^7 (below 1e4).
      for (const double sample : run("baseline", {0.0, 1.0 * order}, record).record.samples)
        ASSERT_NEAR(sample, 0, 1500 * eps * 1e4) << order;
      if (order == 8) continue;
      for (const double sample : run("baseline", {1.0, 1.0 + order}, record).record.samples)
        ASSERT_NEAR(sample, 0, 1500 * eps * 1e4) << order;
    }
}

// Least squares: what is left of the velocity has no part in common with the velocities subtracted.
TEST(Baseline, WhatIsLeftIsOrthogonalToWhatWasTaken) {
  const Accelerogram record = shaking(), out = run("baseline", {0, 2}, record).record;
  const auto left = velocity_history(out);
  double size = 0, linear = 0, square = 0;
  for (std::size_t i = 0; i < record.samples.size(); ++i) {
    const double t = record.step * static_cast<double>(i);
    size += std::abs(left[i]) * t * t;
    linear += left[i] * t;
    square += left[i] * t * t;
  }
  EXPECT_GT(size, 1);
  EXPECT_NEAR(linear / size, 0, 1200 * eps);
  EXPECT_NEAR(square / size, 0, 1200 * eps);
}

TEST(Taper, IsHalfACosineAtEitherEnd) {
  const Accelerogram ones{0.5, 0, std::vector<double>(9, 1.0)};
  const Processed out = run("taper", {1, 2, 0}, ones);
  const double expected[] = {0, 0.5, 1, 1, 1, (1 - std::cos(0.75 * pi)) / 2, 0.5, (1 - std::cos(0.25 * pi)) / 2, 0};
  for (int i = 0; i < 9; ++i) EXPECT_NEAR(out.record.samples[i], expected[i], 4 * eps);
  EXPECT_EQ(out.done, "taper: cosine, 1 s at the start, 2 s at the end");
  EXPECT_EQ(run("taper", {0, 0, 0.25}, ones).done, "taper: cosine, 1 s at the start, 1 s at the end");
}

TEST(Pad, AddsZerosByTimeOrByRule) {
  const Accelerogram record{0.1, 0.1, {1, 2}};
  EXPECT_EQ(run("pad", {0.3, 0.05, 0, 4}, record).record.samples, (std::vector<double>{0, 0, 0, 1, 2, 0}));
  EXPECT_EQ(run("pad", {0.3, 0.05, 0, 4}, record).record.first_sample_at, 0.1);
  const Processed ruled = run("pad", {0, 0, 0.1, 4}, record);  // 1.5 * 4 / 0.1 Hz = 60 s
  EXPECT_EQ(ruled.record.samples.size(), 600u + 2 + 600);
  EXPECT_EQ(ruled.record.samples[600], 1);
  EXPECT_EQ(ruled.done, "pad: 60 s of zeros before, 60 s after (1.5 n / f_c = 60 s, n = 4, f_c = 0.1 Hz)");
}

TEST(Filters, SayWhatTheyDidAndWhetherThereWasRoom) {
  const Accelerogram padded = run("pad", {0, 0, 0.1, 4}, shaking()).record;
  EXPECT_EQ(run("bandpass", {0.1, 25, 4, 0}, padded).done,
            "bandpass: 0.1 to 25 Hz, order 4, acausal (two passes, -6 dB at a corner)");
  EXPECT_EQ(run("bandpass", {0.1, 25, 4, 0}, shaking()).done,
            "bandpass: 0.1 to 25 Hz, order 4, acausal (two passes, -6 dB at a corner); quiet for 0 s before and 0 s "
            "after, where 1.5 n / f_c asks for 60 s: pad first");
  // Twice: what the first filter left in the zeros is quiet.
  EXPECT_EQ(run("lowpass", {25, 4, 0}, run("highpass", {0.1, 4, 0}, padded).record).done,
            "lowpass: below 25 Hz, order 4, acausal (two passes, -6 dB at a corner)");
  EXPECT_EQ(run("lowpass", {25, 2, 1}, shaking()).done,
            "lowpass: below 25 Hz, order 2, causal (one pass, -3 dB at a corner)");
}

// A long sine at the corner comes out with the stated gain: 1/sqrt(2) causal, 1/2 acausal.
TEST(Filters, GainAtTheCornerIsAsStated) {
  for (const double way : {0.0, 1.0}) {
    Accelerogram record{0.01, 0, {}};
    for (int i = 0; i < 8000; ++i) record.samples.push_back(std::sin(2 * pi * 5 * 0.01 * i));
    const Processed out = run("highpass", {5, 4, way}, record);
    // 20 samples a period: mean square over the 100 periods in the middle; transients there are exp(-0.38 2 pi 5 30 s).
    double square = 0;
    for (int i = 3000; i < 5000; ++i) square += out.record.samples[i] * out.record.samples[i];
    EXPECT_NEAR(std::sqrt(2 * square / 2000), way == 0 ? 0.5 : std::numbers::sqrt2 / 2, 1e-10);
  }
}

// Constant amplitude: the integral of a^2 grows evenly, so that 5 to 95 % is the time from 0.05 to 0.95 of the whole.
TEST(Trim, KeepsTheWindowOutwards) {
  const Accelerogram record{0.1, 0, std::vector<double>(101, 1.0)};
  // Total 10 s + 0.1/3 s of the fall to zero: 5 % at 0.5017 s, 95 % at 9.5317 s.
  const Processed out = run("trim", {0.05, 0.95, 0.2, 0}, record);
  EXPECT_EQ(out.record.samples.size(), 96u - 3 + 1);  // 0.3 s to 9.6 s
  EXPECT_EQ(out.record.first_sample_at, 0);
  EXPECT_NE(out.done.find("kept 0.3 to 9.6 s of 10 s"), std::string::npos) << out.done;
  EXPECT_EQ(run("trim", {0.05, 0.95, 20, 20}, record).record.samples, record.samples);
}

TEST(Scale, ReachesEveryMeasure) {
  const Accelerogram record = shaking();
  const auto keys = process_catalogue().back().parameters;
  ASSERT_EQ(process_catalogue().back().name, "scale");
  const std::vector<std::pair<std::string_view, double (*)(const Accelerogram&)>> measures{
      {"pga", &peak_ground_acceleration}, {"pgv", &peak_ground_velocity},         {"pgd", &peak_ground_displacement},
      {"arias", &arias_intensity},        {"cav", &cumulative_absolute_velocity}, {"rms", &rms_acceleration}};
  ASSERT_EQ(keys.size(), measures.size() + 1);
  for (std::size_t i = 0; i < measures.size(); ++i) {
    EXPECT_EQ(keys[i + 1].key, measures[i].first);
    std::vector<double> values(keys.size(), 0.0);
    values[i + 1] = 2.5;
    EXPECT_NEAR(measures[i].second(run("scale", values, record).record), 2.5, 2.5 * 1200 * eps) << keys[i + 1].key;
  }
  EXPECT_EQ(run("scale", {0, 3, 0, 0, 0, 0, 0}, {0.1, 0, {0, -1.5, 1}}).done,
            "scale: factor 2: peak ground acceleration from 1.5 to 3 m/s2");
}

TEST(Rotate, TurnsThePlane) {
  const Accelerogram x{0.1, 0, {1, 0, 3}}, y{0.1, 0, {0, 2, -1}};
  const RotatedPair quarter = rotated(x, y, pi / 2, "pair");
  for (int i = 0; i < 3; ++i) {
    EXPECT_NEAR(quarter.first.samples[i], y.samples[i], 4 * eps);
    EXPECT_NEAR(quarter.second.samples[i], -x.samples[i], 4 * eps);
  }
  EXPECT_EQ(quarter.done, "rotate: by 90 degrees");
  EXPECT_THROW(rotated(x, {0.1, 0, {1, 2}}, 0, "pair"), Error);
  EXPECT_THROW(rotated(x, {0.2, 0, {1, 2, 3}}, 0, "pair"), Error);
}

TEST(ProcessAll, GoesInOrderAndKeepsARecordOfIt) {
  const std::vector<ProcessStep> steps{make_process_step("remove_mean", {}, "a"),
                                       make_process_step("pad", std::vector{1.0, 1.0, 0.0, 4.0}, "b")};
  const ProcessedRecord out = process_all(steps, {0.5, 0, {1, 3}});
  EXPECT_EQ(out.record.samples, (std::vector<double>{0, 0, -1, 1, 0, 0}));
  EXPECT_EQ(out.done,
            (std::vector<std::string>{"remove_mean: 2 m/s2 subtracted", "pad: 1 s of zeros before, 1 s after"}));
}

}  // namespace
}  // namespace pilotis
