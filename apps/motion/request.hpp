// What `pilotis motion` is asked to compute of every record, and how it is typed.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/motion/measures/registry.hpp"

namespace pilotis {

// A spectrum of the bilinear oscillator (core/motion/spectra/inelastic_spectrum.hpp).
struct InelasticRequest {
  enum class Held { ductility, yield_acceleration, strength_ratio };
  Held held = Held::ductility;  // what every oscillator has
  double value = 0;             // -, m/s2 or -
  double post_yield_ratio = 0;  // -
  std::string text;             // as a heading has it, e.g. "ductility 4"
};

struct MotionRequest {
  std::vector<const Measure*> measures;
  std::vector<double> periods;                                                 // s
  std::vector<double> damping_ratios;                                          // -
  bool spectrum = false, histories = false, fourier = false, samples = false;  // what is kept of every record
  std::optional<InelasticRequest> inelastic;
};

// "all", "none" or names separated by commas. Throws Error (input), as all of these do.
std::vector<const Measure*> measures_typed(const std::string& text);

// "0.05:4:80" (80 periods in equal ratios) or "0, 0.2, 0.5"; s.
std::vector<double> periods_typed(const std::string& text);

// "0.02, 0.05" or "2%, 5%".
std::vector<double> damping_typed(const std::string& text);

// "ductility=4", "strength=0.2 g" or "strength_ratio=0.25", and ",post_yield_ratio=0.03" behind it.
InelasticRequest inelastic_typed(const std::string& text);

}  // namespace pilotis
