// The numbers of one record: everything a request asks for, in SI.
#pragma once

#include <string>
#include <vector>

#include "apps/motion/read.hpp"
#include "apps/motion/request.hpp"
#include "core/motion/measures/fourier.hpp"
#include "core/motion/spectra/inelastic_spectrum.hpp"
#include "core/motion/spectra/response_spectrum.hpp"

namespace pilotis {

// From rest, at the times 0, step, 2 step, ... (core/motion/processing/histories.hpp). Nothing is corrected.
struct MotionHistories {
  double step = 0;                   // s
  std::vector<double> acceleration;  // m/s2
  std::vector<double> velocity;      // m/s
  std::vector<double> displacement;  // m
};

struct InelasticPoint {
  double period;              // s
  double yield_acceleration;  // m/s2, yield force over mass
  double strength_ratio;      // -, over the elastic strength
  BilinearPeak peak;
  StrengthFound found = StrengthFound::one;  // of a constant ductility
};
struct InelasticCurve {
  double damping_ratio;  // -
  std::vector<InelasticPoint> points;
};

struct RecordNumbers {
  std::string file, component;  // component: as the file calls it; empty when it does not say
  std::string format, unit;
  std::vector<std::string> notes;
  Accelerogram record;  // without samples unless they are to be kept
  std::size_t samples = 0;
  PeakSample peak;               // m/s2
  std::vector<double> measures;  // SI, in the order of the request
  ResponseSpectrum spectrum;     // empty unless asked for, as all below
  MotionHistories histories;
  FourierAmplitudes fourier;              // frequencies at most 1 / duration apart
  std::vector<InelasticCurve> inelastic;  // [damping ratio]; without the period 0
};

// "one", "largest of several", "jumped over", "not reached".
const char* word_of(StrengthFound found);

// Throws Error (input) that names the file.
RecordNumbers numbers_of(const std::string& file, ReadComponent component, const MotionRequest& request);

}  // namespace pilotis
