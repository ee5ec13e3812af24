#include "core/motion/synthetic/white_noise.hpp"

#include "core/motion/synthetic/enveloped_noise.hpp"
#include "core/motion/synthetic/filtered_noise.hpp"

namespace pilotis::white_noise {

namespace {

constexpr auto parameters = joined(intensity_parameters, envelope_parameters);

}  // namespace

const SyntheticKind kind{
    {"white_noise", "noise that is white up to the Nyquist frequency, with an envelope", parameters},
    " --noise-density \"20 cm2/s3\""};

MadeMotion make(const SyntheticInput& input) {
  require_one_intensity(input);
  const Envelope envelope = envelope_of(input);
  return enveloped(sampled_white_noise(noise_density_of(input), input.grid.step, input.count(), input.grid.seed),
                   envelope, input);
}

}  // namespace pilotis::white_noise
