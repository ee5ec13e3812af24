#include "apps/batch/plan.hpp"

#include <algorithm>
#include <cmath>

#include "apps/buildings.hpp"
#include "integrators/catalogue.hpp"

namespace pilotis {

namespace {

// A shard is what is lost when the machine dies: about a second of one core. Several of them are in memory at a time,
// in every worker and on their way to the disk: so much for peaks and so much for histories.
constexpr double shard_story_steps = 4e7;
constexpr double shard_peak_bytes = 1 << 20, shard_history_bytes = 32 << 20;
constexpr double peak_bytes_of_a_story = 600;  // ten peaks with time and error, kept twice while the errors are told
// Writing a shard takes some hundredths of a second whatever is in it: less work than this is not worth it.
constexpr double least_story_steps = 5e6;
// Enough shards that many workers end together, but none with fewer runs than the widest pack has lanes.
constexpr std::size_t shards_wanted = 64, smallest_shard = 8;
// Below both of these a study is over in seconds and its results fit in memory.
constexpr double short_story_steps = 1e8, short_bytes = 64 << 20;

RunSettings settings_of(const Study& study, const BuildingSummary& summary) {
  const MarchSettings& march = study.march;
  RunSettings settings;
  settings.scheme = make_scheme(march.scheme.name, march.scheme.values, "march.scheme");
  settings.fundamental_period = summary.modes[0].period;
  settings.error_check = march.error_check;
  settings.collapse_drift_ratio = march.collapse_drift_ratio;
  settings.tolerance = march.tolerance;
  settings.halvings = march.halvings;
  settings.histories = study.keep.histories;
  settings.every = study.keep.every;
  settings.initial_displacement = study.initial_displacement;
  settings.initial_velocity = study.initial_velocity;
  return settings;
}

PreparedBuilding prepared(const Study& study, const StudyBuilding& building) {
  AssembledBuilding made = assembled(building);
  RunSettings settings = settings_of(study, made.summary);
  made.summary.name = building.name;
  return {std::move(made.system), std::move(made.summary), std::move(settings)};
}

// s; about when ground and forces have come to rest.
double load_end(const Study& study, const Motion* motion) {
  double end = motion != nullptr ? motion->duration() + motion->step : 0;
  for (const FloorForce& force : study.forces)
    if (!force.times.empty()) end = std::max(end, force.times.back());
  return end;
}

double values_kept(const Study& study, int stories) {
  double values = 1;  // the time
  for (const Quantity* quantity : study.keep.histories)
    values += static_cast<double>(ResponseLayout(stories).count(*quantity));
  return study.keep.histories.empty() ? 0 : values;
}

}  // namespace

std::size_t run_count(const Study& study) {
  const std::size_t motions_by_factors = study.motions.empty() ? 1 : study.motions.size() * study.factors.size();
  return study.buildings.size() * motions_by_factors;
}

BatchPlan::BatchPlan(const Study& study) : study_(study) {
  for (const StudyBuilding& building : study.buildings) buildings_.push_back(prepared(study, building));
  std::vector<Work> works;
  for (std::size_t i = 0; i < buildings_.size(); ++i) {
    works.push_back(work_of(i));
    const auto factors = static_cast<double>(study.factors.size());
    story_steps_ += factors * works.back().story_steps;
    history_bytes_ += factors * works.back().history_bytes;
  }
  for (std::size_t i = 0; i < buildings_.size(); ++i) cut(i, works[i]);
}

std::vector<BuildingSummary> BatchPlan::summaries() const {
  std::vector<BuildingSummary> all;
  for (const PreparedBuilding& building : buildings_) all.push_back(building.summary);
  return all;
}

RunId BatchPlan::id(std::size_t run) const {
  const std::size_t building = run / runs_per_building(), within = run % runs_per_building();
  if (study_.motions.empty()) return {building, 0, 1};
  return {building, within % study_.motions.size(), study_.factors[within / study_.motions.size()]};
}

StepChoice BatchPlan::step(std::size_t building, std::size_t motion) const {
  const PreparedBuilding& of = buildings_[building];
  const double record_step = study_.motions.empty() ? 0.0 : study_.motions[motion].step;
  const StepNeeds needs{of.summary.modes, record_step, !of.system.is_linear()};
  const Scheme& scheme = *of.settings.scheme;
  return study_.march.step ? check_step(scheme.traits(), needs, *study_.march.step, scheme.description())
                           : choose_step(scheme.traits(), needs);
}

BatchPlan::Work BatchPlan::work_of(std::size_t building) const {
  const int stories = static_cast<int>(buildings_[building].summary.heights.size());
  // The check at half the step takes twice the steps.
  const double marches = study_.march.error_check ? 3 : 1;
  Work work;
  for (std::size_t m = 0; m < std::max<std::size_t>(1, study_.motions.size()); ++m) {
    const Motion* motion = study_.motions.empty() ? nullptr : &study_.motions[m];
    const double duration = study_.march.duration.value_or(load_end(study_, motion) + study_.march.tail);
    const double steps = duration / step(building, m).step;
    work.story_steps += steps * stories * marches;
    work.history_bytes += steps / study_.keep.every * values_kept(study_, stories) * sizeof(double);
  }
  return work;
}

// Shards of one size as far as the runs go; no shard holds runs of two buildings.
void BatchPlan::cut(std::size_t building, const Work& work) {
  const std::size_t runs = runs_per_building();
  const auto motions = static_cast<double>(std::max<std::size_t>(1, study_.motions.size()));
  const double stories = static_cast<double>(buildings_[building].summary.heights.size());
  const double per_run = work.story_steps / motions;
  const double by_work = shard_story_steps / per_run;
  const double by_memory = std::min(shard_peak_bytes / (peak_bytes_of_a_story * stories),
                                    shard_history_bytes / std::max(1.0, work.history_bytes / motions));
  const double by_number = static_cast<double>(this->runs()) / static_cast<double>(shards_wanted);
  const double least = story_steps_ > short_story_steps ? least_story_steps / per_run : 0;
  const double wanted = std::max({std::min(by_work, by_number), least, static_cast<double>(smallest_shard)});
  auto size = static_cast<std::size_t>(std::max(1.0, std::min(wanted, by_memory)));
  if (size > smallest_shard) size -= size % smallest_shard;
  for (std::size_t first = 0; first < runs; first += size)
    shards_.push_back({building, building * runs + first, std::min(size, runs - first)});
}

bool BatchPlan::saves_shards() const {
  const double bytes = history_bytes_ + 8000.0 * static_cast<double>(runs());
  return shards_.size() > 1 && (story_steps_ > short_story_steps || bytes > short_bytes);
}

}  // namespace pilotis
