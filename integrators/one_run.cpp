#include "integrators/one_run.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <chrono>
#include <cmath>
#include <limits>

#include "core/response/collapse.hpp"
#include "core/response/energy.hpp"
#include "core/response/histories.hpp"
#include "core/response/peaks.hpp"
#include "core/response/residual.hpp"
#include "core/system/kernel.hpp"
#include "integrators/march.hpp"

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();
constexpr double infinite = std::numeric_limits<double>::infinity();

State<double> initial_state(const System& system, const Load& load, const RunPlan& plan) {
  State<double> state = state_at_rest<double>(system);
  for (std::size_t i = 0; i < plan.initial_displacement.size(); ++i)
    state.u[system.stories.floor[i]] = plan.initial_displacement[i];
  for (std::size_t i = 0; i < plan.initial_velocity.size(); ++i)
    state.v[system.stories.floor[i]] = plan.initial_velocity[i];
  start(system, load, state);
  return state;
}

// N; what a residual of 1 is measured against: the largest load, or force on a freedom at the start.
double force_scale(const System& system, const Load& load, const State<double>& state) {
  double scale = load.largest();
  for (int i = 0; i < system.freedoms; ++i) scale = std::max(scale, std::abs(system.mass[i] * state.a[i]));
  return scale;
}

// One march with everything that is always observed.
struct Watched {
  Watched(const System& system, const ResponseLayout& layout, const RunPlan& plan, WorkRule rule, long steps, double dt)
      : peaks(layout),
        residual(layout, residual_from(plan, steps * dt)),
        collapse(layout, plan.collapse_drift_ratio),
        energy(system, rule),
        histories(layout, plan.histories, plan.every, steps) {}

  static double residual_from(const RunPlan& plan, double end) {
    return end - std::min(plan.fundamental_period, plan.tail) - 1e-9 * end;
  }

  PeakWatch peaks;
  ResidualWatch residual;
  CollapseWatch collapse;
  EnergyWatch energy;
  HistoryKeeper histories;
  MarchEnd end;
};

WorkRule work_rule(const Traits& traits) {
  return traits.order == 0 || traits.order > 2 ? WorkRule::corrected : WorkRule::trapezoid;
}

Watched marched(const System& system, const Load& load, const RunPlan& plan, const Scheme& scheme, double dt) {
  const ResponseLayout layout(static_cast<int>(system.stories.height.size()));
  const long steps = std::max(1L, std::lround(std::ceil(plan.duration / dt - 1e-6)));
  State<double> state = initial_state(system, load, plan);
  Watched watched(system, layout, plan, work_rule(scheme.traits()), steps, dt);
  const auto stepper = scheme.prepare(system, {dt, plan.tolerance * force_scale(system, load, state)});
  Observer* observers[] = {&watched.peaks, &watched.residual, &watched.energy, &watched.histories, &watched.collapse};
  watched.end = march(system, load, *stepper, {dt, steps, plan.halvings}, state, observers);
  return watched;
}

RunStatus status_of(MarchEnding ending) {
  if (ending == MarchEnding::done) return RunStatus::done;
  return ending == MarchEnding::stopped ? RunStatus::collapsed : RunStatus::not_converged;
}

std::string status_note(const Watched& watched, const RunPlan& plan) {
  const double t = watched.end.time;
  switch (watched.end.ending) {
    case MarchEnding::done:
      return "";
    case MarchEnding::stopped:
      return fmt::format("collapsed at {:.4g} s: story {} passed the drift ratio {:g}", t, watched.collapse.story(),
                         plan.collapse_drift_ratio);
    case MarchEnding::not_converged:
      return fmt::format("not converged at {:.4g} s, with the step halved {} times", t, plan.halvings);
    case MarchEnding::not_finite:
      return fmt::format("not converged at {:.4g} s: numbers became infinite", t);
  }
  return "";
}

// Multiplies the difference between a march and its check into the march's own error.
double error_multiple(const System& system, const Traits& traits) {
  return system.is_linear() && traits.order == 2 ? 4.0 / 3 : 2.0;
}

// What each peak of one quantity, bottom to top, changed by in the check, as a share of itself: the largest share of
// three adjacent places, itself among them.
std::vector<double> pooled_shares(const Peak* peaks, const Peak* finer, std::size_t count) {
  std::vector<double> own(count), pooled(count);
  for (std::size_t i = 0; i < count; ++i) {
    const double size = std::abs(peaks[i].value);
    own[i] = size > 0 ? std::abs(size - std::abs(finer[i].value)) / size : 0;
  }
  const std::size_t width = std::min<std::size_t>(3, count);
  for (std::size_t i = 0; i < count; ++i) {
    const std::size_t first = std::min(i > 0 ? i - 1 : 0, count - width);
    pooled[i] = *std::max_element(own.begin() + first, own.begin() + first + width);
  }
  return pooled;
}

void add_peak_errors(const Watched& watched, const Watched& check, double multiple, const ResponseLayout& layout,
                     std::vector<Peak>& peaks) {
  for (const Quantity& quantity : quantities()) {
    const std::size_t first = layout.offset(quantity), count = layout.count(quantity);
    const std::vector<double> shares = pooled_shares(&peaks[first], &check.peaks.peaks()[first], count);
    for (std::size_t i = 0; i < count; ++i) {
      Peak& peak = peaks[first + i];
      const double finer = std::abs(check.peaks.peaks()[first + i].value), size = std::abs(peak.value);
      const double change = std::max(size * shares[i], std::abs(size - finer));
      peak.step_error = multiple * change + watched.peaks.between_states()[first + i];
    }
  }
  peaks[layout.offset(*find_quantity("base_shear"))].step_error =
      peaks[layout.offset(*find_quantity("story_shear"))].step_error;
}

void add_errors(const Watched& watched, const Watched& check, double multiple, const ResponseLayout& layout,
                RunResult& result) {
  if (status_of(check.end.ending) != result.status) {
    for (Peak& peak : result.peaks) peak.step_error = infinite;
    std::fill(result.residual_error.begin(), result.residual_error.end(), infinite);
    result.status_note += fmt::format("{}the check at half the step ended otherwise: {}",
                                      result.status_note.empty() ? "" : "; ", status_name(status_of(check.end.ending)));
    return;
  }
  add_peak_errors(watched, check, multiple, layout, result.peaks);
  const std::vector<double> finer = check.residual.drift();
  for (std::size_t i = 0; i < finer.size(); ++i)
    result.residual_error[i] = multiple * std::abs(result.residual_drift[i] - finer[i]);
}

RunResult collected(const Watched& watched, const RunPlan& plan) {
  RunResult result;
  result.scheme = plan.scheme->description();
  result.step = plan.step;
  result.status = status_of(watched.end.ending);
  result.status_note = status_note(watched, plan);
  result.time_reached = watched.end.time;
  result.energy_error = watched.energy.error();
  result.energy_input = watched.energy.now().input;
  result.energy_damping = watched.energy.now().damping;
  result.energy_absorbed = watched.energy.now().absorbed;
  result.peaks = watched.peaks.peaks();
  for (Peak& peak : result.peaks) peak.step_error = unknown;
  result.residual_drift = watched.residual.drift();
  result.residual_swing = watched.residual.swing();
  result.residual_error.assign(result.residual_drift.size(), unknown);
  result.times = watched.histories.times();
  result.histories = watched.histories.histories();
  return result;
}

}  // namespace

RunResult run_once(const System& system, const Load& load, const RunPlan& plan) {
  const auto begin = std::chrono::steady_clock::now();
  const Watched watched = marched(system, load, plan, *plan.scheme, plan.step);
  RunResult result = collected(watched, plan);
  if (plan.error_check && result.status != RunStatus::not_converged) {
    RunPlan check = plan;
    check.histories.clear();
    const std::shared_ptr<const Scheme> finer = plan.scheme->refined();
    const Watched finer_march = marched(system, load, check, finer ? *finer : *plan.scheme, plan.step / 2);
    const ResponseLayout layout(static_cast<int>(system.stories.height.size()));
    add_errors(watched, finer_march, error_multiple(system, plan.scheme->traits()), layout, result);
  }
  result.wall_time = std::chrono::duration<double>(std::chrono::steady_clock::now() - begin).count();
  return result;
}

}  // namespace pilotis
