// The largest strength at which a yielding oscillator reaches a ductility, found by trying eight strengths at a time.
//
// Ductility need not fall as strength grows: several strengths can give the same one, and the one required is the
// largest (Chopra, "Dynamics of Structures", ch. 7; from memory). So the search comes from the elastic strength down,
// in ratios of 2^(1/8), until the ductility is passed for the first time, and then divides that interval by nine again
// and again. A crossing and back within one ratio of 2^(1/8), 9 %, would be missed. It also looks one octave further
// down, only to say whether weaker strengths come back to the target.
#pragma once

#include <array>
#include <span>

#include "core/motion/spectra/bilinear_peaks.hpp"

namespace pilotis {

enum class StrengthFound {
  one,      // the only strength found with this ductility
  largest,  // the largest of several
  jumped,   // the ductility jumps over the target; the strength just above the jump, so its ductility is below the
            // target
  none      // not reached at 1/4096 of the elastic strength
};

class StrengthSearch {
 public:
  static constexpr int tries = 8;

  // target > 1.
  explicit StrengthSearch(double target) : target_(target) {}

  bool done() const { return stage_ == Stage::done; }
  // Strength over elastic strength, to be tried now, falling.
  std::array<double, tries> next() const;
  // What they gave.
  void take(std::span<const BilinearPeak, tries> peaks);

  // Once done.
  StrengthFound found() const { return found_; }
  double ratio() const { return best_ratio_; }             // strength over elastic strength; NaN with none
  const BilinearPeak& peak() const { return best_peak_; }  // at that strength; NaN with none

 private:
  enum class Stage { scan, look_further, narrow, done };

  void scan(std::span<const BilinearPeak, tries> peaks);
  void look_further(std::span<const BilinearPeak, tries> peaks);
  void narrow(std::span<const BilinearPeak, tries> peaks);
  // Whether the target is passed among the tries; if so they become the ends of the interval.
  bool bracket(std::span<const BilinearPeak, tries> peaks);
  void finish_if_met();
  void finish(StrengthFound found, double ratio, const BilinearPeak& peak);

  double target_;
  Stage stage_ = Stage::scan;
  double strong_ = 1, weak_ = 0;                     // the interval: ductility below, and not below, the target
  BilinearPeak strong_peak_{1, 0, 0}, weak_peak_{};  // what they gave
  bool several_ = false;
  StrengthFound found_ = StrengthFound::none;
  double best_ratio_ = 0;
  BilinearPeak best_peak_{};
};

}  // namespace pilotis
