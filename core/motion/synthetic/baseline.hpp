// Brings the ground to rest at the end of a made motion.
//
// The corrected motion is  a(t) - I(t) (c0 + c1 s + c2 s^2 + c3 s^3),  s = 2 t / T - 1,  with I the envelope (so the
// motion still starts from nothing and dies away). The four numbers make the mean square of the ground velocity least
// (as Berg & Housner 1961 do with a parabola, Bulletin of the Seismological Society of America 51, 175) among those for
// which ground velocity and displacement are zero after the last sample has fallen to zero. The acceleration is taken
// linear between samples, as everywhere here.
#pragma once

#include <string>
#include <vector>

namespace pilotis {

// Changes `acceleration` (m/s2, evenly spaced from t = 0) in place. `envelope`: I at the same times. Returns one line
// that says what was done.
std::string correct_baseline(std::vector<double>& acceleration, const std::vector<double>& envelope);

// Ground velocity (m/s) at each sample and, as a last value, one step later when the acceleration has fallen to zero;
// ground displacement (m) at the same times. At rest before the first sample.
std::vector<double> ground_velocity(const std::vector<double>& acceleration, double step);
std::vector<double> ground_displacement(const std::vector<double>& acceleration, double step);

}  // namespace pilotis
