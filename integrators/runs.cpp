#include "integrators/runs.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <chrono>
#include <cmath>
#include <limits>

#include "integrators/march_lanes.hpp"
#include "integrators/stepper_take.hpp"
#include "integrators/task_feed.hpp"

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();
constexpr double infinite = std::numeric_limits<double>::infinity();

WorkRule work_rule(const Traits& traits) {
  return traits.order == 0 || traits.order > 2 ? WorkRule::corrected : WorkRule::trapezoid;
}

// `dt` is the run's own step, or half of it for the check.
MarchTask march_task(const RunTask& task, const RunSettings& settings, double dt, bool check) {
  const auto& [step, duration, tail] = task.length;
  const long steps = std::max(1L, std::lround(std::ceil(duration / dt - 1e-6)));
  const double end = static_cast<double>(steps) * dt;
  return {task.load, dt, steps, end - std::min(settings.fundamental_period, tail) - 1e-9 * end, !check};
}

// One march after the other, for schemes that have no lanes.
bool march_singly(const System& system, const Scheme& scheme, const BatchSettings& settings,
                  std::span<const MarchTask> tasks, Marched* out, BatchWatch* watch) {
  for (std::size_t i = 0; i < tasks.size(); ++i) {
    const State<double> from = initial_state(system, *tasks[i].load, settings);
    const auto stepper = scheme.prepare(system, {tasks[i].dt, step_tolerance(system, *tasks[i].load, from, settings)});
    Watches<double> watches(system, settings);
    TaskFeed<double> feed(system, settings, tasks.subspan(i, 1), watches, out + i,
                          watch != nullptr ? &watch->marches_ended : nullptr);
    StepperTake take{*stepper};
    LaneLoop<double> loop(system, settings.halvings, watches.all());
    if (!loop.run(take, feed, watch != nullptr ? &watch->stop : nullptr)) return false;
  }
  return true;
}

bool march_all(const System& system, const Scheme& scheme, const BatchSettings& settings,
               std::span<const MarchTask> tasks, Marched* out, BatchWatch* watch) {
  if (const ImplicitCoefficients* implicit = scheme.implicit())
    return march_lanes(chosen_instruction_set())(system, *implicit, settings, tasks, out,
                                                 watch != nullptr ? &watch->stop : nullptr,
                                                 watch != nullptr ? &watch->marches_ended : nullptr);
  return march_singly(system, scheme, settings, tasks, out, watch);
}

RunStatus status_of(MarchEnding ending) {
  if (ending == MarchEnding::done) return RunStatus::done;
  return ending == MarchEnding::stopped ? RunStatus::collapsed : RunStatus::not_converged;
}

std::string status_note(const Marched& marched, const RunSettings& settings) {
  const double t = marched.end.time;
  switch (marched.end.ending) {
    case MarchEnding::done:
      return "";
    case MarchEnding::stopped:
      return fmt::format("collapsed at {:.4g} s: story {} passed the drift ratio {:g}", t, marched.collapsed_story,
                         settings.collapse_drift_ratio);
    case MarchEnding::not_converged:
      return fmt::format("not converged at {:.4g} s, with the step halved {} times", t, settings.halvings);
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

void add_peak_errors(const Marched& marched, const Marched& check, double multiple, const ResponseLayout& layout,
                     std::vector<Peak>& peaks) {
  for (const Quantity& quantity : quantities()) {
    const std::size_t first = layout.offset(quantity), count = layout.count(quantity);
    const std::vector<double> shares = pooled_shares(&peaks[first], &check.peaks[first], count);
    for (std::size_t i = 0; i < count; ++i) {
      Peak& peak = peaks[first + i];
      const double finer = std::abs(check.peaks[first + i].value), size = std::abs(peak.value);
      const double change = std::max(size * shares[i], std::abs(size - finer));
      peak.step_error = multiple * change + marched.between_states[first + i];
    }
  }
  peaks[layout.offset(*find_quantity("base_shear"))].step_error =
      peaks[layout.offset(*find_quantity("story_shear"))].step_error;
}

void add_errors(const Marched& marched, const Marched& check, double multiple, const ResponseLayout& layout,
                RunResult& result) {
  if (status_of(check.end.ending) != result.status) {
    for (Peak& peak : result.peaks) peak.step_error = infinite;
    std::fill(result.residual_error.begin(), result.residual_error.end(), infinite);
    result.status_note += fmt::format("{}the check at half the step ended otherwise: {}",
                                      result.status_note.empty() ? "" : "; ", status_name(status_of(check.end.ending)));
    return;
  }
  add_peak_errors(marched, check, multiple, layout, result.peaks);
  const std::vector<double>& finer = check.residual_drift;
  for (std::size_t i = 0; i < finer.size(); ++i)
    result.residual_error[i] = multiple * std::abs(result.residual_drift[i] - finer[i]);
}

RunResult collected(const Marched& marched, const RunSettings& settings, double step) {
  RunResult result;
  result.scheme = settings.scheme->description();
  result.step = step;
  result.status = status_of(marched.end.ending);
  result.status_note = status_note(marched, settings);
  result.time_reached = marched.end.time;
  result.energy_error = marched.energy_error;
  result.energy_input = marched.energies.input;
  result.energy_damping = marched.energies.damping;
  result.energy_absorbed = marched.energies.absorbed;
  result.peaks = marched.peaks;
  for (Peak& peak : result.peaks) peak.step_error = unknown;
  result.residual_drift = marched.residual_drift;
  result.residual_swing = marched.residual_swing;
  result.residual_error.assign(result.residual_drift.size(), unknown);
  result.times = marched.times;
  result.histories = marched.histories;
  return result;
}

// All marches of a batch: the runs' own first, then, for an error check, the same at half the step.
bool march_with_checks(const System& system, const RunSettings& settings, std::span<const RunTask> tasks,
                       std::vector<Marched>& marched, BatchWatch* watch) {
  BatchSettings common = settings;
  common.work_rule = work_rule(settings.scheme->traits());
  std::vector<MarchTask> marches;
  for (const RunTask& task : tasks) marches.push_back(march_task(task, settings, task.length.step, false));
  if (settings.error_check)
    for (const RunTask& task : tasks) marches.push_back(march_task(task, settings, task.length.step / 2, true));
  marched.resize(marches.size());
  const std::shared_ptr<const Scheme> finer = settings.error_check ? settings.scheme->refined() : nullptr;
  if (finer == nullptr) return march_all(system, *settings.scheme, common, marches, marched.data(), watch);
  const std::span<const MarchTask> all(marches);
  const std::size_t n = tasks.size();
  return march_all(system, *settings.scheme, common, all.first(n), marched.data(), watch) &&
         march_all(system, *finer, common, all.subspan(n), marched.data() + n, watch);
}

}  // namespace

int marches_per_run(const RunSettings& settings) { return settings.error_check ? 2 : 1; }

bool run_many(const System& system, const RunSettings& settings, std::span<const RunTask> tasks,
              std::span<RunResult> results, BatchWatch* watch) {
  const auto begin = std::chrono::steady_clock::now();
  std::vector<Marched> marched;
  if (!march_with_checks(system, settings, tasks, marched, watch)) return false;
  const ResponseLayout layout(static_cast<int>(system.stories.height.size()));
  const double multiple = error_multiple(system, settings.scheme->traits());
  const std::size_t n = tasks.size();
  for (std::size_t i = 0; i < n; ++i) {
    results[i] = collected(marched[i], settings, tasks[i].length.step);
    if (settings.error_check && results[i].status != RunStatus::not_converged)
      add_errors(marched[i], marched[n + i], multiple, layout, results[i]);
  }
  const double elapsed = std::chrono::duration<double>(std::chrono::steady_clock::now() - begin).count();
  for (RunResult& result : results) result.wall_time = elapsed / static_cast<double>(n);
  return true;
}

RunResult run_once(const System& system, const Load& load, const RunPlan& plan) {
  const RunTask task{&load, plan};
  RunResult result;
  run_many(system, plan, {&task, 1}, {&result, 1}, nullptr);
  return result;
}

}  // namespace pilotis
