// The motions that `pilotis fit` is offered, and their spectra.
#pragma once

#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "core/motion/spectra/oscillator.hpp"
#include "io/records/record.hpp"

namespace pilotis {

// One record, or the two horizontal components of one motion, "A+B".
struct FitMotion {
  std::string name;                // as typed
  std::vector<std::string> files;  // one or two
  bool is_pair() const { return files.size() == 2; }
};

// What was typed: files, pairs of files, folders (all their files, sorted by name). Throws Error (input) when a file is
// missing, a folder is empty, or pairs stand beside single records, which cannot be compared.
std::vector<FitMotion> motions_typed(const std::vector<std::string>& typed, const std::string& where);

// The records of a motion, one or two. Of a pair the shorter one is followed by zeros, which is what it stands for
// (core/motion/accelerogram.hpp). Throws Error.
std::vector<Accelerogram> components_of(const FitMotion& motion, const RecordHints& hints);

// Pseudo-acceleration (m/s2) of each oscillator, periods > 0: of one record, or RotD100 of two, which is the maximum
// direction.
std::vector<double> pseudo_accelerations(std::span<const Accelerogram> components,
                                         std::span<const Oscillator> oscillators, const std::string& where);

struct MotionSpectrum {
  std::vector<double> accelerations;  // m/s2, [oscillator]
  double peak = 0;                    // m/s2, largest magnitude of a sample
};

// Of all motions, in their order, read and computed side by side on all cores with a progress bar. Of several errors
// the one of the first motion is thrown.
std::vector<MotionSpectrum> spectra_of(const std::vector<FitMotion>& motions, std::span<const Oscillator> oscillators,
                                       const RecordHints& hints);

}  // namespace pilotis
