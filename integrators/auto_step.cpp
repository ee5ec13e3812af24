#include "integrators/auto_step.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr double two_pi = 2 * std::numbers::pi;
constexpr double share_that_matters = 0.99;        // of the mass
constexpr double steps_per_yielding_period = 200;  // of the first mode, when laws yield
constexpr double stability_margin = 0.9;

// Number (from 1) of the mode with which the effective masses pass the share that matters.
int last_mode_that_matters(const std::vector<Mode>& modes) {
  double total = 0, sum = 0;
  for (const Mode& mode : modes) total += mode.effective_mass;
  for (std::size_t j = 0; j < modes.size(); ++j) {
    sum += modes[j].effective_mass;
    if (sum >= share_that_matters * total) return static_cast<int>(j) + 1;
  }
  return static_cast<int>(modes.size());
}

struct Ceiling {
  double step = 0;
  std::string why;
};

void lower_to(Ceiling& ceiling, double step, std::string why) {
  if (step < ceiling.step) ceiling = {step, std::move(why)};
}

Ceiling largest_step(const Traits& traits, const StepNeeds& needs) {
  const int mode = last_mode_that_matters(needs.modes);
  const double period = needs.modes[mode - 1].period;
  Ceiling ceiling{traits.accurate_omega_dt * period / two_pi,
                  fmt::format("T{} = {:.4g} s (modes 1-{} carry 99 % of the mass) at omega dt <= {:.3g}", mode, period,
                              mode, traits.accurate_omega_dt)};
  if (needs.nonlinear)
    lower_to(ceiling, needs.modes[0].period / steps_per_yielding_period,
             fmt::format("T1 = {:.4g} s over {:g}, for yielding", needs.modes[0].period, steps_per_yielding_period));
  if (std::isfinite(traits.stability_limit))
    lower_to(ceiling, stability_margin * traits.stability_limit * needs.modes.back().period / two_pi,
             fmt::format("stability: omega dt < {:.4g} in the highest mode, T{} = {:.4g} s", traits.stability_limit,
                         needs.modes.size(), needs.modes.back().period));
  return ceiling;
}

// The largest of 1, 2, 5 times a power of ten that is not above x.
double round_down(double x) {
  const double decade = std::pow(10.0, std::floor(std::log10(x)));
  for (double head : {5.0, 2.0, 1.0})
    if (head * decade <= x) return head * decade;
  return decade;
}

}  // namespace

StepChoice choose_step(const Traits& traits, const StepNeeds& needs) {
  const Ceiling ceiling = largest_step(traits, needs);
  if (needs.record_step <= 0) {
    const double step = round_down(ceiling.step);
    return {step, fmt::format("auto: {:g} s, from {}", step, ceiling.why)};
  }
  const double parts = std::max(1.0, std::ceil(needs.record_step / ceiling.step * (1 - 1e-12)));
  const double step = needs.record_step / parts;
  if (parts == 1)
    return {step, fmt::format("auto: the record's {:g} s; {} would allow {:.3g} s", step, ceiling.why, ceiling.step)};
  return {step, fmt::format("auto: {:.6g} s, the record's {:g} s over {:g}, from {}", step, needs.record_step, parts,
                            ceiling.why)};
}

StepChoice check_step(const Traits& traits, const StepNeeds& needs, double step, const std::string& scheme) {
  const double limit = traits.stability_limit * needs.modes.back().period / two_pi;
  if (step > limit)
    throw input_error("march.step",
                      fmt::format("found {:g} s, at which {} is unstable in mode {} (T = {:.4g} s)", step, scheme,
                                  needs.modes.size(), needs.modes.back().period),
                      fmt::format("at most {:.4g} s, or an unconditionally stable scheme", limit));
  std::string why = "from the study";
  const double parts = needs.record_step / step;
  if (needs.record_step > 0 && std::abs(parts - std::round(parts)) > 1e-6 * parts)
    why += fmt::format("; it does not divide the record's {:g} s, so samples fall between steps", needs.record_step);
  const Ceiling ceiling = largest_step(traits, needs);
  if (step > ceiling.step * (1 + 1e-9))
    why += fmt::format("; rough: {:.3g} s would follow from {}", ceiling.step, ceiling.why);
  return {step, why};
}

}  // namespace pilotis
