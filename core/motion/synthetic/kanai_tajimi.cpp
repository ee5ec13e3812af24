#include "core/motion/synthetic/kanai_tajimi.hpp"

#include <numbers>

#include "core/motion/synthetic/enveloped_noise.hpp"
#include "core/motion/synthetic/filtered_noise.hpp"

namespace pilotis::kanai_tajimi {

namespace {

constexpr auto parameters = joined(intensity_parameters, ground_parameters, envelope_parameters);

}  // namespace

const SyntheticKind kind{
    {"kanai_tajimi", "white noise filtered by the ground (Kanai, Tajimi), with an envelope", parameters},
    " --pga \"0.35 g\""};

MadeMotion make(const SyntheticInput& input) {
  require_one_intensity(input);
  require_fine_step(input, "ground_period", input["ground_period"]);
  const Envelope envelope = envelope_of(input);
  const NoiseFilter<2> filter = kanai_tajimi_filter(2 * std::numbers::pi / input["ground_period"],
                                                    input["ground_damping"], noise_density_of(input), input.grid.step);
  return enveloped(filtered_noise(filter, input.count(), input.grid.seed), envelope, input);
}

}  // namespace pilotis::kanai_tajimi
