#include "apps/report_json.hpp"

#include <algorithm>
#include <cmath>

#include "apps/json_stream.hpp"
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

// With the building's name before it where there are several.
Json named(const RunTable& table, int building) {
  Json json = Json::object();
  if (table.buildings().size() > 1) json["building"] = table.buildings().at(static_cast<std::size_t>(building)).name;
  return json;
}

Json factor(const RunTable& table, const SetFacts& facts) {
  Json json = named(table, facts.building);
  json.update({{"factor", facts.factor},
               {"runs", facts.runs},
               {"done", facts.done},
               {"collapsed", facts.collapsed},
               {"not_converged", facts.not_converged},
               {"stories", Json::array()}});
  for (const StoryFacts& one : facts.stories) json["stories"].push_back(story(one));
  json["base_shear"] = largest(facts.base_shear, nullptr);
  json["roof_displacement"] = largest(facts.roof_displacement, "floor");
  json["floor_acceleration"] = largest(facts.floor_acceleration, "floor");
  json["overturning_moment"] = largest(facts.overturning_moment, nullptr);
  return json;
}

Json building(const BuildingSummary& summary, bool several) {
  const Bulk bulk = bulk_of(summary);
  Json periods = Json::array(), json = Json::object();
  for (const Mode& mode : summary.modes) periods.push_back(number(mode.period));
  if (several) json["name"] = summary.name;
  json.update({{"title", summary.title},
               {"stories", summary.heights.size()},
               {"height", bulk.height},
               {"weight", bulk.weight},
               {"periods", periods}});
  return json;
}

Json limit(const Limit& one) {
  Json json{{"quantity", one.quantity->name}, {"statistic", statistic_name(one.statistic)}};
  if (one.statistic == Statistic::percentile) json["percentile"] = one.percentile;
  json["value"] = one.value;
  json["unit"] = si_unit(one.quantity->dimension);
  json["source"] = one.source;
  return json;
}

Json outcome(const RunTable& table, const Outcome& one, const std::vector<Limit>& limits) {
  const Limit& judged = limits.at(static_cast<std::size_t>(one.limit));
  Json json{{"limit", limit(judged)}};
  json.update(named(table, one.building));
  json.update({{"factor", one.factor},
               {"value", number(one.value)},
               {"step_error", number(one.step_error)},
               {"unit", si_unit(judged.quantity->dimension)},
               {"margin", number(one.margin)},
               {"exceeded", one.exceeded},
               {"finding", finding_name(one.finding)}});
  if (one.place > 0) json[judged.quantity->per == Per::story ? "story" : "floor"] = one.place;
  json["motion"] = one.motion;
  json["runs"] = one.runs;
  json["collapsed"] = one.collapsed;
  json["not_converged"] = one.not_converged;
  return json;
}

Json ended(const RunTable& table, std::size_t number_of_run, const RunResult& run) {
  Json json{{"run", number_of_run}};
  json.update(named(table, run.building));
  json.update({{"motion", run.motion},
               {"factor", run.factor},
               {"status", status_name(run.status)},
               {"time_reached", number(run.time_reached)},
               {"note", run.status_note}});
  return json;
}

// Runs that did not last, with where and when; read some at a time.
void write_ended_early(JsonStream& out, const RunTable& table) {
  constexpr std::size_t at_once = 256;
  const auto statuses = table.statuses();
  const auto is_open = [](RunStatus status) { return status != RunStatus::done; };
  for (std::size_t first = 0; first < table.runs(); first += at_once) {
    const auto part = statuses.subspan(first, std::min(at_once, table.runs() - first));
    if (std::none_of(part.begin(), part.end(), is_open)) continue;
    const std::vector<RunResult> runs = table.rows(first, part.size(), RowParts::heads);
    for (std::size_t i = 0; i < runs.size(); ++i)
      if (is_open(runs[i].status)) out.element(ended(table, first + i, runs[i]));
  }
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

void write_report_json(const StudyHeader& header, const RunTable& table, const Verdict& verdict,
                       const std::function<void(std::string_view)>& write) {
  const bool several = table.buildings().size() > 1;
  JsonStream out(write);
  out.member("title", header.title);
  out.member("study_file", header.study_file);
  out.member("program_version", header.program_version);
  out.member("created", header.created);
  out.member("units", units());
  if (several)
    out.array("buildings", [&] {
      for (const BuildingSummary& one : table.buildings()) out.element(building(one, several));
    });
  else
    out.member("building", building(table.buildings().at(0), several));
  out.member("runs", verdict.runs);
  out.member("collapsed", verdict.collapsed);
  out.member("not_converged", verdict.not_converged);
  out.array("ended_early", [&] { write_ended_early(out, table); });
  out.array("factors", [&] {
    for (const RunSet& set : table.sets()) out.element(factor(table, set_facts(table, set, header.limits)));
  });
  out.array("verdict", [&] {
    for (const Outcome& one : verdict.outcomes) out.element(outcome(table, one, header.limits));
  });
  out.member("exit_status", exit_status(verdict));
  out.member("caution", "Results rest on the model; local codes and licensed practice decide.");
  out.finish();
}

}  // namespace pilotis
