#include "core/motion/synthetic/enveloped_noise.hpp"

#include <fmt/format.h>

#include "core/motion/synthetic/baseline.hpp"

namespace pilotis {

MadeMotion enveloped(std::vector<double> noise, const Envelope& envelope, const SyntheticInput& input) {
  const std::vector<double> intensity = sampled(envelope, input);
  for (std::size_t i = 0; i < noise.size(); ++i) noise[i] *= intensity[i];
  MadeMotion motion;
  motion.record.step = input.grid.step;
  motion.record.samples = std::move(noise);
  motion.notes.push_back(correct_baseline(motion.record.samples, intensity));
  scale_to_intensity(motion.record, input);
  motion.notes.push_back(fmt::format("Arias intensity {:.4g} m/s", arias_intensity_of(motion.record)));
  return motion;
}

}  // namespace pilotis
