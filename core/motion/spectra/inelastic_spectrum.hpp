// Inelastic spectra of the bilinear oscillator: what a given strength does, and what strength a given ductility needs.
// The oscillator, its ductility and the error of the march: bilinear_peaks.hpp. Chopra, ch. 7 (from memory):
//   f_o = k u_o, u_o the peak of the elastic oscillator; strength ratio f_y / f_o (normalized yield strength), 1 / R_y
#pragma once

#include <vector>

#include "core/motion/spectra/strength_search.hpp"

namespace pilotis {

// ---- constant strength --------------------------------------------------------------------------------------------

// The oscillators with the yield accelerations (m/s2) that are `strength_ratio` (> 0) times the elastic ones under this
// ground, seen at the same steps. Throws Error (input) at `where`, also for a ground that does not move.
std::vector<BilinearOscillator> with_strength_ratio(const Ground& ground, std::span<const Oscillator> oscillators,
                                                    double strength_ratio, const std::string& where,
                                                    const StepRule& rule = bilinear_rule);

// One point per oscillator at the same yield acceleration (m/s2): the yield coefficient times g. See bilinear_peaks for
// strengths that differ.
std::vector<BilinearPeak> constant_strength_spectrum(const Ground& ground, double post_yield_ratio,
                                                     std::span<const Oscillator> oscillators, double yield_acceleration,
                                                     const std::string& where, const StepRule& rule = bilinear_rule);

// ---- constant ductility -------------------------------------------------------------------------------------------

struct RequiredStrength {
  StrengthFound found;        // strength_search.hpp
  double yield_acceleration;  // m/s2: f_y / m
  double strength_ratio;      // f_y / f_o
  BilinearPeak peak;  // at that strength; its ductility is within 1e-4 of the target when found is one or largest
};

// One point per oscillator, for a target ductility of at least 1 (1: the elastic strength itself). How the strength is
// searched, and what happens where several have the ductility: strength_search.hpp. Throws Error (input) at `where`.
std::vector<RequiredStrength> constant_ductility_spectrum(const Ground& ground, double post_yield_ratio,
                                                          std::span<const Oscillator> oscillators, double ductility,
                                                          const std::string& where,
                                                          const StepRule& rule = bilinear_rule);

}  // namespace pilotis
