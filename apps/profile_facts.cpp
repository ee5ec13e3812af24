#include "apps/profile_facts.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();
using Runs = std::vector<const RunResult*>;

Runs done_of(const Runs& runs) {
  Runs done;
  for (const RunResult* run : runs)
    if (run->status == RunStatus::done) done.push_back(run);
  return done;
}

Largest largest_at(const StudyResults& results, const Runs& done, const Quantity& quantity, int place) {
  std::vector<RunPeak> peaks;
  for (const RunResult* run : done) peaks.push_back(run_peak(results, *run, quantity, place));
  const SuiteValue largest = suite_value(peaks, Statistic::max, 0);
  Largest found{largest.value, largest.step_error, suite_value(peaks, Statistic::mean, 0).value, place, ""};
  if (largest.governing) found.motion = largest.governing->motion;
  return found;
}

// Over all stories or floors.
Largest largest_of(const StudyResults& results, const Runs& done, const Quantity& quantity) {
  Largest worst = largest_at(results, done, quantity, 1);
  for (int place = 2; place <= places_of(quantity, results); ++place)
    if (Largest here = largest_at(results, done, quantity, place); here.value > worst.value) worst = here;
  if (quantity.per == Per::run) worst.place = 0;
  return worst;
}

const Limit* drift_limit_for(const std::vector<Limit>& limits, double factor) {
  for (const Limit& limit : limits) {
    const auto& factors = limit.factors;
    const bool applies = factors.empty() || std::find(factors.begin(), factors.end(), factor) != factors.end();
    if (limit.quantity->name == "drift_ratio" && applies) return &limit;
  }
  return nullptr;
}

double statistic_at(const StudyResults& results, const Runs& runs, const Limit& limit, int place) {
  std::vector<RunPeak> peaks;
  for (const RunResult* run : runs) peaks.push_back(run_peak(results, *run, *limit.quantity, place));
  return suite_value(peaks, limit.statistic, limit.percentile).value;
}

StoryFacts story_facts(const StudyResults& results, const Runs& runs, const Runs& done, const Limit* limit, int story) {
  StoryFacts facts;
  facts.story = story;
  const auto& labels = results.building.labels;
  if (static_cast<std::size_t>(story) <= labels.size()) facts.label = labels[static_cast<std::size_t>(story) - 1];
  facts.drift_ratio = largest_at(results, done, *find_quantity("drift_ratio"), story);
  facts.residual_drift_ratio = largest_at(results, done, residual_drift_ratio(), story);
  facts.ductility = largest_at(results, done, *find_quantity("ductility"), story);
  facts.story_shear = largest_at(results, done, *find_quantity("story_shear"), story);
  facts.statistic = limit ? statistic_at(results, runs, *limit, story) : unknown;
  facts.margin = limit ? (limit->value - facts.statistic) / limit->value : unknown;
  return facts;
}

int count_of(const Runs& runs, RunStatus status) {
  return static_cast<int>(
      std::count_if(runs.begin(), runs.end(), [=](const RunResult* r) { return r->status == status; }));
}

FactorFacts factor_facts(const StoredStudy& stored, double factor) {
  const StudyResults& results = stored.results;
  const Runs runs = runs_at(results, factor), done = done_of(runs);
  const int stories = static_cast<int>(results.building.heights.size());
  FactorFacts facts;
  facts.factor = factor;
  facts.runs = static_cast<int>(runs.size());
  facts.done = static_cast<int>(done.size());
  facts.collapsed = count_of(runs, RunStatus::collapsed);
  facts.not_converged = count_of(runs, RunStatus::not_converged);
  facts.limit = drift_limit_for(stored.limits, factor);
  for (int story = 1; story <= stories; ++story)
    facts.stories.push_back(story_facts(results, runs, done, facts.limit, story));
  facts.base_shear = largest_of(results, done, *find_quantity("base_shear"));
  facts.roof_displacement = largest_at(results, done, *find_quantity("floor_displacement"), stories);
  facts.floor_acceleration = largest_of(results, done, *find_quantity("floor_acceleration"));
  facts.overturning_moment = largest_at(results, done, *find_quantity("overturning_moment"), 1);
  return facts;
}

}  // namespace

ProfileFacts profile_facts(const StoredStudy& stored) {
  const BuildingSummary& building = stored.results.building;
  ProfileFacts facts;
  facts.height = std::accumulate(building.heights.begin(), building.heights.end(), 0.0);
  facts.weight = std::accumulate(building.masses.begin(), building.masses.end(), 0.0) * standard_gravity;
  for (double factor : factors_of(stored.results)) facts.factors.push_back(factor_facts(stored, factor));
  return facts;
}

}  // namespace pilotis
