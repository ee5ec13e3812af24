#include "core/motion/synthetic/intensity.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"

namespace pilotis {

void require_one_intensity(const SyntheticInput& input) {
  const int asked = (input["pga"] > 0) + (input["arias"] > 0) + (input["noise_density"] > 0);
  if (asked == 1) return;
  throw input_error(input.where,
                    fmt::format("found pga {:g} m/s2, arias {:g} m/s and noise_density {:g} m2/s3", input["pga"],
                                input["arias"], input["noise_density"]),
                    "give exactly one of pga, arias and noise_density, greater than 0");
}

double noise_density_of(const SyntheticInput& input) { return input["noise_density"] > 0 ? input["noise_density"] : 1; }

double arias_intensity_of(const Accelerogram& record) {
  const std::vector<double>& a = record.samples;
  double squares = a.back() * a.back();
  for (std::size_t i = 1; i < a.size(); ++i) squares += a[i - 1] * a[i - 1] + a[i - 1] * a[i] + a[i] * a[i];
  return std::numbers::pi / (2 * standard_gravity) * squares * record.step / 3;
}

void scale_to_intensity(Accelerogram& record, const SyntheticInput& input) {
  double factor = 1;
  if (input["pga"] > 0) factor = input["pga"] / std::abs(peak_of(record).value);
  if (input["arias"] > 0) factor = std::sqrt(input["arias"] / arias_intensity_of(record));
  for (double& sample : record.samples) sample *= factor;
}

}  // namespace pilotis
