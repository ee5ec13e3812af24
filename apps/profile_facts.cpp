#include "apps/profile_facts.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numeric>

#include "core/verdict/statistics.hpp"

namespace pilotis {

namespace {

constexpr double unknown = std::numeric_limits<double>::quiet_NaN();

const BuildingSummary& building_of(const RunTable& table, const RunSet& set) {
  return table.buildings().at(static_cast<std::size_t>(set.building));
}

Largest largest_at(const RunTable& table, const RunSet& set, const Quantity& quantity, int place) {
  const DoneValue found = done_value(suite_column(table, set, quantity, place));
  return {found.largest, found.step_error, found.mean, place, found.run ? table.motion(set.first + *found.run) : ""};
}

// Over all stories or floors.
Largest largest_of(const RunTable& table, const RunSet& set, const Quantity& quantity) {
  Largest worst = largest_at(table, set, quantity, 1);
  for (int place = 2; place <= places_of(quantity, building_of(table, set)); ++place)
    if (Largest here = largest_at(table, set, quantity, place); here.value > worst.value) worst = here;
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

// Quantity by quantity over all stories: a file is then read block by block.
void fill_stories(const RunTable& table, const RunSet& set, const Quantity& quantity, Largest StoryFacts::*member,
                  std::vector<StoryFacts>& stories) {
  for (StoryFacts& story : stories) story.*member = largest_at(table, set, quantity, story.story);
}

std::vector<StoryFacts> stories_of(const RunTable& table, const RunSet& set, const Limit* limit) {
  const BuildingSummary& building = building_of(table, set);
  std::vector<StoryFacts> stories(building.heights.size());
  for (std::size_t i = 0; i < stories.size(); ++i) {
    StoryFacts& story = stories[i];
    story.story = static_cast<int>(i) + 1;
    if (i < building.labels.size()) story.label = building.labels[i];
    story.statistic = limit ? suite_value(suite_column(table, set, *limit->quantity, story.story), limit->statistic,
                                          limit->percentile)
                                  .value
                            : unknown;
    story.margin = limit ? (limit->value - story.statistic) / limit->value : unknown;
  }
  fill_stories(table, set, *find_quantity("drift_ratio"), &StoryFacts::drift_ratio, stories);
  fill_stories(table, set, residual_drift_ratio(), &StoryFacts::residual_drift_ratio, stories);
  fill_stories(table, set, *find_quantity("ductility"), &StoryFacts::ductility, stories);
  fill_stories(table, set, *find_quantity("story_shear"), &StoryFacts::story_shear, stories);
  return stories;
}

}  // namespace

SetFacts set_facts(const RunTable& table, const RunSet& set, const std::vector<Limit>& limits) {
  SetFacts facts;
  facts.building = set.building;
  facts.factor = set.factor;
  for (RunStatus status : table.statuses().subspan(set.first, set.count)) {
    ++facts.runs;
    facts.done += status == RunStatus::done;
    facts.collapsed += status == RunStatus::collapsed;
    facts.not_converged += status == RunStatus::not_converged;
  }
  facts.limit = drift_limit_for(limits, set.factor);
  facts.stories = stories_of(table, set, facts.limit);
  facts.base_shear = largest_of(table, set, *find_quantity("base_shear"));
  facts.roof_displacement =
      largest_at(table, set, *find_quantity("floor_displacement"), static_cast<int>(facts.stories.size()));
  facts.floor_acceleration = largest_of(table, set, *find_quantity("floor_acceleration"));
  facts.overturning_moment = largest_at(table, set, *find_quantity("overturning_moment"), 1);
  return facts;
}

Largest largest_drift_ratio(const RunTable& table, const RunSet& set) {
  return largest_of(table, set, *find_quantity("drift_ratio"));
}

Bulk bulk_of(const BuildingSummary& building) {
  return {std::accumulate(building.heights.begin(), building.heights.end(), 0.0),
          std::accumulate(building.masses.begin(), building.masses.end(), 0.0) * standard_gravity};
}

MarchFacts march_facts(const RunTable& table) {
  MarchFacts facts{"", INFINITY, 0, 0};
  if (table.runs() == 0) return facts;
  facts.scheme = table.rows(0, 1, RowParts::heads)[0].scheme;
  std::vector<double> part;
  for (std::size_t first = 0; first < table.runs(); first += part.size()) {
    part.resize(std::min<std::size_t>(4096, table.runs() - first));
    table.numbers(&RunResult::step, first, part);
    for (double step : part) {
      facts.least_step = std::min(facts.least_step, step);
      facts.largest_step = std::max(facts.largest_step, step);
    }
    table.numbers(&RunResult::energy_error, first, part);
    for (double error : part) facts.energy_error = std::fmax(facts.energy_error, error);
  }
  return facts;
}

}  // namespace pilotis
