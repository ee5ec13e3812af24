#include "apps/batch/dry.hpp"

#include <algorithm>
#include <chrono>
#include <memory>

#include "core/system/load.hpp"

namespace pilotis {

namespace {

constexpr double sample_story_steps = 2e6;
constexpr std::size_t sample_runs = 8;  // as many as the widest pack has lanes

// Story-steps per second of one thread, from the start of the first runs of the first building.
double measured_rate(const BatchPlan& plan) {
  const Study& study = plan.study();
  const PreparedBuilding& building = plan.building(0);
  const std::size_t runs = std::min(sample_runs, plan.runs() / study.buildings.size());
  const auto stories = static_cast<double>(building.summary.heights.size());
  const double marches = study.march.error_check ? 3 : 1;
  std::vector<std::shared_ptr<const Accelerogram>> records;
  std::vector<std::unique_ptr<Load>> loads;
  std::vector<RunTask> tasks;
  double work = 0;
  for (std::size_t i = 0; i < runs; ++i) {
    const RunId id = plan.id(i);
    records.push_back(study.motions.empty() ? nullptr : study.motions.samples(id.motion));
    loads.push_back(std::make_unique<Load>(building.system, records.back().get(), id.factor, study.forces));
    const double step = plan.step(0, id.motion).step;
    const double steps = std::min(loads.back()->end() / step + 1, sample_story_steps / stories / sample_runs);
    tasks.push_back({loads.back().get(), {step, steps * step, 0}});
    work += steps * stories * marches;
  }
  std::vector<RunResult> results(runs);
  const auto begin = std::chrono::steady_clock::now();
  run_many(building.system, building.settings, tasks, results, nullptr);
  return work / std::chrono::duration<double>(std::chrono::steady_clock::now() - begin).count();
}

}  // namespace

BatchEstimate estimate(const BatchPlan& plan, int threads) {
  BatchEstimate found;
  found.seconds = plan.story_steps() / measured_rate(plan) / threads;
  std::size_t most_stories = 0;
  for (const BuildingSummary& building : plan.summaries())
    most_stories = std::max(most_stories, building.heights.size());
  // Three numbers per value, four residuals a story, and about this much of texts and scalars.
  constexpr double bytes_of_a_run = 400;
  const ResponseLayout layout(static_cast<int>(most_stories));
  const double numbers = 3.0 * static_cast<double>(layout.size()) + 4.0 * static_cast<double>(most_stories);
  found.peak_bytes = static_cast<double>(plan.runs()) * (8 * numbers + bytes_of_a_run);
  found.history_bytes = plan.history_bytes() * (plan.study().keep.format.single ? 0.5 : 1);
  return found;
}

}  // namespace pilotis
