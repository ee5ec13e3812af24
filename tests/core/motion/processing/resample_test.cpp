#include "core/motion/processing/resample.hpp"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <numbers>

#include "core/error.hpp"
#include "core/motion/processing/registry.hpp"

namespace pilotis {
namespace {

constexpr double eps = std::numeric_limits<double>::epsilon();

// A wave in a Gaussian envelope. Its spectrum is a Gaussian around 3 Hz with the deviation 1 / (2 pi 0.5 s) = 0.32 Hz;
// from 10 Hz on it is below exp(-(7 / 0.32)^2 / 2) = 1e-104 of its peak, and at t = 0 and 16 s it is below
// exp(-(8 / 0.5)^2 / 2) = 1e-55: band-limited and of finite length, as far as a double can tell.
double wave(double t) {
  const double s = (t - 8) / 0.5;
  return std::exp(-s * s / 2) * std::sin(2 * std::numbers::pi * 3 * t);
}

Accelerogram sampled(double step, double first_sample_at = 0) {
  Accelerogram record{step, first_sample_at, {}};
  for (int i = 0; first_sample_at + i * step <= 16 * (1 + 1e-12); ++i)
    record.samples.push_back(wave(first_sample_at + i * step));
  return record;
}

TEST(Resample, BandLimitedSignalIsKeptToRounding) {
  // log2(N) eps of a transform each way, and the argument of the sine: 2 pi 3 16 eps.
  const double tolerance = 40 * eps + 400 * eps;
  for (const double from : {0.005, 0.01, 0.02, 0.025, 0.04})
    for (const double to : {0.004, 0.005, 0.01, 0.02, 0.025, 0.05, 1.0 / 128, 0.003})
      for (const double first : {0.0, from}) {
        const Accelerogram old = sampled(from, first);
        const Processed out = Resample{to, Resample::Manner::band_limited}.applied(old);
        EXPECT_EQ(out.record.step, to);
        EXPECT_EQ(out.record.first_sample_at, 0);
        ASSERT_EQ(out.record.samples.size(), static_cast<std::size_t>(std::floor(16 / to * (1 + 1e-12))) + 1);
        for (std::size_t i = 0; i < out.record.samples.size(); ++i)
          ASSERT_NEAR(out.record.samples[i], wave(static_cast<double>(i) * to), tolerance) << from << " " << to;
      }
}

// 3 Hz and 30 Hz in equal parts; a step of 0.02 s keeps 25 Hz: half of the energy goes.
TEST(Resample, SaysHowMuchIsLost) {
  Accelerogram record{0.005, 0, {}};
  for (int i = 0; i <= 3200; ++i) {
    const double t = i * 0.005, s = (t - 8) / 0.5;
    record.samples.push_back(wave(t) + std::exp(-s * s / 2) * std::sin(2 * std::numbers::pi * 30 * t));
  }
  const Processed out = process(make_process_step("resample", std::vector{0.02, 0.0}, "here"), record);
  EXPECT_EQ(out.done,
            "resample: 0.005 s to 0.02 s, band limited, information lost: all at and above 25 Hz, 50 % of the energy");
  for (std::size_t i = 0; i < out.record.samples.size(); ++i)
    ASSERT_NEAR(out.record.samples[i], wave(static_cast<double>(i) * 0.02), 2000 * eps);
  EXPECT_EQ(process(make_process_step("resample", std::vector{0.0025, 0.0}, "here"), record).done,
            "resample: 0.005 s to 0.0025 s, band limited, nothing lost");
}

TEST(Resample, LinearStaysOnTheStraightLines) {
  const Accelerogram record{0.5, 0.5, {2, -2, 4}};
  const Processed finer = process(make_process_step("resample", std::vector{0.25, 1.0}, "here"), record);
  EXPECT_EQ(finer.record.samples, (std::vector<double>{0, 1, 2, 0, -2, 1, 4}));
  EXPECT_EQ(finer.done, "resample: 0.5 s to 0.25 s, linear between samples");
  const Processed coarser = process(make_process_step("resample", std::vector{0.75, 1.0}, "here"), record);
  EXPECT_EQ(coarser.record.samples, (std::vector<double>{0, 0, 4}));
  EXPECT_EQ(coarser.done, "resample: 0.5 s to 0.75 s, linear between samples; what was above 0.666667 Hz is aliased");
}

TEST(Resample, RefusesWhatItCannotDo) {
  const Accelerogram record{0.01, 0, std::vector<double>(100, 1.0)};
  const auto problem = [&](double to, double method) -> std::string {
    try {
      process(make_process_step("resample", std::vector{to, method}, "study.toml:7: process[1]"), record);
    } catch (const Error& e) {
      EXPECT_EQ(e.where(), "study.toml:7: process[1].to");
      return e.what();
    }
    return "";
  };
  EXPECT_NE(problem(0.01 * std::numbers::sqrt2, 0).find("whole numbers up to 1000"), std::string::npos);
  EXPECT_NE(problem(5, 0).find("found 5 s for a record of 0.99 s"), std::string::npos);
  EXPECT_NE(problem(1e-12, 1).find("must divide"), std::string::npos);
}

}  // namespace
}  // namespace pilotis
