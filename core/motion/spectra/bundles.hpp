// Oscillators into the lanes of bundles and their extremes out of them.
#pragma once

#include <vector>

#include "core/motion/spectra/oscillator_extremes.hpp"
#include "core/motion/spectra/oscillator_kernel.hpp"

namespace pilotis {

// The members at rest, eight to a bundle; the last one is repeated until the last bundle is full. step: s.
std::vector<OscillatorBundle> bundles_at_rest(std::span<const Oscillator> oscillators, std::span<const int> members,
                                              double step);

// What lane `lane` has seen, with the free vibration that follows its state.
OscillatorExtremes extremes_of(const OscillatorBundle& bundle, int lane, const Oscillator& oscillator);

// m of the step rule for every oscillator; 0 for the rigid ones, which do not march.
std::vector<int> subdivisions(std::span<const Oscillator> oscillators, double step, const StepRule& rule);

}  // namespace pilotis
