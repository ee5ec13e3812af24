#include "apps/report_json.hpp"

#include <cmath>

#include "apps/profile_facts.hpp"

namespace pilotis {

namespace {

using Json = nlohmann::ordered_json;

Json number(double value) { return std::isfinite(value) ? Json(value) : Json(nullptr); }

Json largest(const Largest& found, const char* place) {
  Json json{{"largest", number(found.value)}, {"step_error", number(found.step_error)}, {"mean", number(found.mean)}};
  if (place) json[place] = found.place;
  json["motion"] = found.motion;
  return json;
}

Json story(const StoryFacts& facts) {
  return {{"story", facts.story},
          {"label", facts.label},
          {"drift_ratio", largest(facts.drift_ratio, nullptr)},
          {"drift_ratio_statistic", number(facts.statistic)},
          {"drift_ratio_beyond", std::isinf(facts.statistic)},
          {"margin", number(facts.margin)},
          {"residual_drift_ratio", largest(facts.residual_drift_ratio, nullptr)},
          {"ductility", largest(facts.ductility, nullptr)},
          {"story_shear", largest(facts.story_shear, nullptr)}};
}

Json factor(const FactorFacts& facts) {
  Json json{{"factor", facts.factor},
            {"runs", facts.runs},
            {"done", facts.done},
            {"collapsed", facts.collapsed},
            {"not_converged", facts.not_converged},
            {"stories", Json::array()}};
  for (const StoryFacts& one : facts.stories) json["stories"].push_back(story(one));
  json["base_shear"] = largest(facts.base_shear, nullptr);
  json["roof_displacement"] = largest(facts.roof_displacement, "floor");
  json["floor_acceleration"] = largest(facts.floor_acceleration, "floor");
  json["overturning_moment"] = largest(facts.overturning_moment, nullptr);
  return json;
}

Json building(const BuildingSummary& summary, const ProfileFacts& facts) {
  Json periods = Json::array();
  for (const Mode& mode : summary.modes) periods.push_back(number(mode.period));
  return {{"title", summary.title},
          {"stories", summary.heights.size()},
          {"height", facts.height},
          {"weight", facts.weight},
          {"periods", periods}};
}

Json limit(const Limit& one) {
  Json json{{"quantity", one.quantity->name}, {"statistic", statistic_name(one.statistic)}};
  if (one.statistic == Statistic::percentile) json["percentile"] = one.percentile;
  json["value"] = one.value;
  json["unit"] = si_unit(one.quantity->dimension);
  json["source"] = one.source;
  return json;
}

Json outcome(const Outcome& one, const std::vector<Limit>& limits) {
  const Limit& judged = limits.at(static_cast<std::size_t>(one.limit));
  Json json{{"limit", limit(judged)},
            {"factor", one.factor},
            {"value", number(one.value)},
            {"step_error", number(one.step_error)},
            {"unit", si_unit(judged.quantity->dimension)},
            {"margin", number(one.margin)},
            {"exceeded", one.exceeded},
            {"finding", finding_name(one.finding)}};
  if (one.place > 0) json[judged.quantity->per == Per::story ? "story" : "floor"] = one.place;
  json["motion"] = one.motion;
  json["runs"] = one.runs;
  json["collapsed"] = one.collapsed;
  json["not_converged"] = one.not_converged;
  return json;
}

// Runs that did not last, with where and when.
Json ended_early(const std::vector<RunResult>& runs) {
  Json list = Json::array();
  for (std::size_t i = 0; i < runs.size(); ++i) {
    const RunResult& run = runs[i];
    if (run.status == RunStatus::done) continue;
    list.push_back({{"run", i},
                    {"motion", run.motion},
                    {"factor", run.factor},
                    {"status", status_name(run.status)},
                    {"time_reached", number(run.time_reached)},
                    {"note", run.status_note}});
  }
  return list;
}

Json units() {
  Json json;
  for (const char* name :
       {"drift_ratio", "story_shear", "base_shear", "overturning_moment", "ductility", "floor_acceleration"})
    json[name] = si_unit(find_quantity(name)->dimension);
  json["residual_drift_ratio"] = "1";
  json["roof_displacement"] = json["height"] = "m";
  json["weight"] = "N";
  json["periods"] = json["time_reached"] = "s";
  json["margin"] = "1";
  return json;
}

}  // namespace

nlohmann::ordered_json report_json(const StoredStudy& stored, const Verdict& verdict) {
  const ProfileFacts facts = profile_facts(stored);
  Json json{{"title", stored.title},
            {"study_file", stored.study_file},
            {"program_version", stored.program_version},
            {"created", stored.created},
            {"units", units()},
            {"building", building(stored.results.building, facts)},
            {"runs", verdict.runs},
            {"collapsed", verdict.collapsed},
            {"not_converged", verdict.not_converged},
            {"ended_early", ended_early(stored.results.runs)},
            {"factors", Json::array()},
            {"verdict", Json::array()}};
  for (const FactorFacts& one : facts.factors) json["factors"].push_back(factor(one));
  for (const Outcome& one : verdict.outcomes) json["verdict"].push_back(outcome(one, stored.limits));
  json["exit_status"] = exit_status(verdict);
  json["caution"] = "Results rest on the model; local codes and licensed practice decide.";
  return json;
}

}  // namespace pilotis
