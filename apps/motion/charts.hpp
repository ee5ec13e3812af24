// Records as charts: histories, spectra, whatever was asked for.
#pragma once

#include "apps/motion/pair.hpp"
#include "apps/plot/chart.hpp"

namespace pilotis {

// More records than this are too many to be told apart: their histories are not drawn, and their spectra are drawn pale
// behind the median and the 16th and 84th percentiles at every period.
constexpr std::size_t most_drawn_apart = 8;

// Acceleration, velocity and displacement; `name` stands in the titles.
std::vector<Chart> history_charts(const RecordNumbers& record, const std::string& name);

// Response spectra of all records: pseudo-acceleration, pseudo-velocity or displacement.
enum class Ordinate { pseudo_acceleration, pseudo_velocity, displacement };
Chart spectrum_chart(const std::vector<RecordNumbers>& records, const MotionRequest& request, Ordinate ordinate);

// What else was asked for: inelastic spectra, Fourier amplitudes, RotD.
std::vector<Chart> further_charts(const std::vector<RecordNumbers>& records, const MotionRequest& request,
                                  const PairNumbers& pair);

// All of it as rows of one picture.
std::vector<std::vector<Chart>> picture_rows(const std::vector<RecordNumbers>& records, const MotionRequest& request,
                                             const PairNumbers& pair);

}  // namespace pilotis
