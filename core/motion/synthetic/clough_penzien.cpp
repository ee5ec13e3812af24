#include "core/motion/synthetic/clough_penzien.hpp"

#include <fmt/format.h>

#include <numbers>

#include "core/error.hpp"
#include "core/motion/synthetic/enveloped_noise.hpp"
#include "core/motion/synthetic/filtered_noise.hpp"
#include "core/motion/synthetic/kanai_tajimi.hpp"

namespace pilotis::clough_penzien {

namespace {

// omega_f = omega_g / 10, zeta_f = zeta_g: common practice.
constexpr std::array<Parameter, 2> filter_parameters{
    positive("filter_period", Dimension::time, "period of the second filter, 2 pi / omega_f", 4),
    damping_ratio("filter_damping", "damping ratio of the second filter, zeta_f", 0.6)};
constexpr auto parameters =
    joined(intensity_parameters, kanai_tajimi::ground_parameters, filter_parameters, envelope_parameters);

}  // namespace

const SyntheticKind kind{
    {"clough_penzien", "Kanai-Tajimi noise with its long periods filtered out, with an envelope", parameters},
    " --pga \"0.35 g\" --envelope saragoni_hart"};

MadeMotion make(const SyntheticInput& input) {
  require_one_intensity(input);
  const double ground = input["ground_period"], filter = input["filter_period"];
  require_fine_step(input, "ground_period", ground);
  if (filter <= ground)
    throw input_error(input.at("filter_period"), fmt::format("found {} s", filter),
                      fmt::format("it must be greater than ground_period, {} s", ground));
  const Envelope envelope = envelope_of(input);
  constexpr double turn = 2 * std::numbers::pi;
  const NoiseFilter<4> noise = clough_penzien_filter(turn / ground, input["ground_damping"], turn / filter,
                                                     input["filter_damping"], noise_density_of(input), input.grid.step);
  return enveloped(filtered_noise(noise, input.count(), input.grid.seed), envelope, input);
}

}  // namespace pilotis::clough_penzien
