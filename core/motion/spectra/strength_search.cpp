#include "core/motion/spectra/strength_search.hpp"

#include <cmath>
#include <limits>

namespace pilotis {

namespace {

constexpr double close_enough = 1e-4;           // of the target ductility
constexpr double narrowest = 1e-10;             // of the strength; below, rounding and sampling rule
constexpr double weakest_scanned = 1.0 / 4096;  // of the elastic strength

}  // namespace

std::array<double, StrengthSearch::tries> StrengthSearch::next() const {
  const double from = stage_ == Stage::look_further ? weak_ : strong_;
  const double step =
      stage_ == Stage::narrow ? std::pow(weak_ / strong_, 1.0 / (tries + 1)) : std::pow(0.5, 1.0 / tries);
  std::array<double, tries> ratios;
  for (int j = 0; j < tries; ++j) ratios[j] = from * std::pow(step, j + 1);
  return ratios;
}

void StrengthSearch::take(std::span<const BilinearPeak, tries> peaks) {
  switch (stage_) {
    case Stage::scan:
      return scan(peaks);
    case Stage::look_further:
      return look_further(peaks);
    case Stage::narrow:
      return narrow(peaks);
    case Stage::done:
      return;
  }
}

// A ductility that is not a number ends the search: the comparison is written so that it counts as passed.
bool StrengthSearch::bracket(std::span<const BilinearPeak, tries> peaks) {
  const std::array<double, tries> ratios = next();
  for (int j = 0; j < tries; ++j) {
    if (!(peaks[j].ductility < target_)) {
      weak_ = ratios[j];
      weak_peak_ = peaks[j];
      for (int k = j + 1; k < tries; ++k) several_ = several_ || peaks[k].ductility < target_;
      return true;
    }
    strong_ = ratios[j];
    strong_peak_ = peaks[j];
  }
  return false;
}

void StrengthSearch::scan(std::span<const BilinearPeak, tries> peaks) {
  if (bracket(peaks)) {
    stage_ = Stage::look_further;
  } else if (strong_ <= weakest_scanned) {
    constexpr double nothing = std::numeric_limits<double>::quiet_NaN();
    finish(StrengthFound::none, nothing, {nothing, nothing, nothing});
  }
}

void StrengthSearch::look_further(std::span<const BilinearPeak, tries> peaks) {
  for (const BilinearPeak& peak : peaks) several_ = several_ || peak.ductility < target_;
  stage_ = Stage::narrow;
  finish_if_met();
}

void StrengthSearch::narrow(std::span<const BilinearPeak, tries> peaks) {
  bracket(peaks);  // without a crossing among the tries it lies between the last of them and the weak end
  finish_if_met();
}

void StrengthSearch::finish_if_met() {
  const StrengthFound found = several_ ? StrengthFound::largest : StrengthFound::one;
  if (std::abs(weak_peak_.ductility / target_ - 1) <= close_enough)
    finish(found, weak_, weak_peak_);
  else if (std::abs(strong_peak_.ductility / target_ - 1) <= close_enough)
    finish(found, strong_, strong_peak_);
  else if (strong_ / weak_ - 1 < narrowest)
    finish(StrengthFound::jumped, strong_, strong_peak_);
}

void StrengthSearch::finish(StrengthFound found, double ratio, const BilinearPeak& peak) {
  stage_ = Stage::done;
  found_ = found;
  best_ratio_ = ratio;
  best_peak_ = peak;
}

}  // namespace pilotis
