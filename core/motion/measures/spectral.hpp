// Measures of a record's response spectrum. Whoever calls says how ordinates are computed; nothing is computed here but
// what is made of them.
#pragma once

#include <functional>
#include <span>
#include <string>
#include <vector>

namespace pilotis {

// The 5 % damped pseudo-velocities (m/s) of the record in question at these periods (s), in the same order.
using PseudoVelocities = std::function<std::vector<double>(std::span<const double> periods)>;

// m: integral of the 5 % damped pseudo-velocity over the periods from 0.1 s to 2.5 s, by the trapezoidal rule at every
// 0.01 s. Housner 1952, Intensity of ground motion during strong earthquakes, Caltech; with 5 % as is usual today.
double housner_intensity(const PseudoVelocities& pseudo_velocities);

// The same from a table: periods rising, from 0.1 s or less to 2.5 s or more; linear between. Throws Error (input) at
// `where` when the table does not reach so far.
double housner_intensity(std::span<const double> periods, std::span<const double> pseudo_velocities,
                         const std::string& where);

// s: the period at which the 5 % damped spectral acceleration is largest (the first of equal ones). Rathje, Abrahamson
// & Bray 1998 (their T_p). From a function: at 500 periods from 0.02 s to 10 s, evenly spaced in the logarithm.
double predominant_period(const PseudoVelocities& pseudo_velocities);
// From a table of periods (s) and spectral accelerations (m/s2), neither empty.
double predominant_period(std::span<const double> periods, std::span<const double> spectral_accelerations);

}  // namespace pilotis
