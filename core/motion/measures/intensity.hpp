// Intensity measures of an accelerogram alone: peaks, energy, durations.
//
// Integrals are exact for the motion as it is marched: linear between samples, from 0 where the first sample is at one
// step, back to 0 within one step after the last (core/motion/processing/histories.hpp). Velocity and displacement are
// integrated from rest and not corrected: those of an unprocessed record drift. Every measure of a record of zeros is
// 0.
#pragma once

#include "core/motion/accelerogram.hpp"

namespace pilotis {

// Largest magnitude of acceleration (m/s2), and of velocity (m/s) and displacement (m) at the samples' times.
double peak_ground_acceleration(const Accelerogram& record);
double peak_ground_velocity(const Accelerogram& record);
double peak_ground_displacement(const Accelerogram& record);
double velocity_acceleration_ratio(const Accelerogram& record);  // PGV / PGA, s

// m/s: pi / (2 g) times the integral of a^2, g = 9.80665 m/s2. Arias 1970, A measure of earthquake intensity, in Hansen
// (ed.), Seismic Design for Nuclear Power Plants, MIT Press, 438.
double arias_intensity(const Accelerogram& record);

// m/s: the integral of |a|. EPRI 1988, A criterion for determining exceedance of the operating basis earthquake, report
// NP-5930 (the plain one, without the later windows of one second).
double cumulative_absolute_velocity(const Accelerogram& record);

// The times (s, from t = 0) at which the integral of a^2 reaches these shares (0 to 1) of its final value; between
// samples it is taken to grow evenly.
struct TimeWindow {
  double begin = 0, end = 0;
};
TimeWindow arias_window(const Accelerogram& record, double from, double to);

// s: length of that window. Trifunac & Brady 1975, Bulletin of the Seismological Society of America 65, 581 (5 to 95
// %).
double significant_duration(const Accelerogram& record, double from, double to);
double significant_duration_5_75(const Accelerogram& record);
double significant_duration_5_95(const Accelerogram& record);

// s: from the first to the last sample at or above `threshold` (m/s2, > 0) in magnitude; 0 when there are none. Bolt
// 1973, Proc. 5th World Conf. Earthquake Engineering, 1304.
double bracketed_duration(const Accelerogram& record, double threshold);
double bracketed_duration_005g(const Accelerogram& record);  // the common threshold, 0.05 g

// m/s2: root of the mean of a^2 from t = 0 to the last sample's return to zero (the whole record, not a part of it).
double rms_acceleration(const Accelerogram& record);

}  // namespace pilotis
