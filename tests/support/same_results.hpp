// Results that must be equal to the last bit, where NaN equals NaN.
#pragma once

#include <gtest/gtest.h>

#include <cmath>
#include <string>
#include <vector>

#include "core/response/results.hpp"

namespace pilotis {

inline void expect_same(const std::vector<double>& a, const std::vector<double>& b, const std::string& what) {
  ASSERT_EQ(a.size(), b.size()) << what;
  for (std::size_t i = 0; i < a.size(); ++i)
    EXPECT_TRUE(a[i] == b[i] || (std::isnan(a[i]) && std::isnan(b[i]))) << what << "[" << i << "]";
}

// All but histories.
inline void expect_same(const RunResult& a, const RunResult& b) {
  EXPECT_EQ(a.building, b.building);
  EXPECT_EQ(a.motion, b.motion);
  EXPECT_EQ(a.scheme, b.scheme);
  EXPECT_EQ(a.step_choice, b.step_choice);
  EXPECT_EQ(a.status, b.status);
  EXPECT_EQ(a.status_note, b.status_note);
  expect_same({a.factor, a.step, a.time_reached, a.energy_error, a.energy_input, a.energy_damping, a.energy_absorbed,
               a.wall_time},
              {b.factor, b.step, b.time_reached, b.energy_error, b.energy_input, b.energy_damping, b.energy_absorbed,
               b.wall_time},
              "numbers of the run");
  expect_same(a.residual_drift, b.residual_drift, "residual drift");
  expect_same(a.residual_swing, b.residual_swing, "residual swing");
  expect_same(a.residual_error, b.residual_error, "residual error");
  ASSERT_EQ(a.peaks.size(), b.peaks.size());
  for (std::size_t i = 0; i < a.peaks.size(); ++i)
    expect_same({a.peaks[i].value, a.peaks[i].time, a.peaks[i].step_error},
                {b.peaks[i].value, b.peaks[i].time, b.peaks[i].step_error}, "peak");
}

inline void expect_same_histories(const RunResult& a, const RunResult& b) {
  EXPECT_EQ(a.times, b.times);
  ASSERT_EQ(a.histories.size(), b.histories.size());
  for (std::size_t i = 0; i < a.histories.size(); ++i) {
    EXPECT_EQ(a.histories[i].quantity, b.histories[i].quantity);
    EXPECT_EQ(a.histories[i].values, b.histories[i].values);
  }
}

}  // namespace pilotis
