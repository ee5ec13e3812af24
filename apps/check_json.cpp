#include "apps/batch/plan.hpp"
#include "apps/check_show.hpp"
#include "core/laws/law_values.hpp"
#include "integrators/catalogue.hpp"

namespace pilotis {

namespace {

using nlohmann::ordered_json;

ordered_json parameters_json(std::span<const Parameter> parameters, const std::vector<double>& values) {
  ordered_json json = ordered_json::object();
  for (std::size_t i = 0; i < values.size(); ++i)
    json[std::string(parameters[i].key)] = {{"value", values[i]}, {"unit", si_unit(parameters[i].dimension)}};
  return json;
}

ordered_json stories_json(const Stick& stick) {
  ordered_json list = ordered_json::array();
  for (const Story& story : stick.stories) {
    const Method& method = law_method(story.spring);
    list.push_back({{"label", story.label},
                    {"height_m", story.height},
                    {"weight_N", story.mass * stick.gravity},
                    {"mass_kg", story.mass},
                    {"dashpot_N_s_per_m", story.dashpot},
                    {"law", method.name},
                    {"parameters", parameters_json(method.parameters, law_values(story.spring))}});
  }
  return list;
}

ordered_json building_json(const StudyBuilding& building) {
  const Stick& stick = building.stick;
  const BuildingFacts facts = facts_of(building);
  return {{"name", building.name},
          {"title", building.title},
          {"file", building.file.string()},
          {"kind", "stick"},
          {"height_m", facts.height},
          {"weight_N", facts.weight},
          {"first_periods_s", facts.first_periods},
          {"damping", damping_text(stick.damping)},
          {"p_delta", stick.p_delta},
          {"gravity_m_per_s2", stick.gravity},
          {"stories", stories_json(stick)}};
}

ordered_json buildings_json(const Study& study) {
  ordered_json list = ordered_json::array();
  for (const StudyBuilding& building : study.buildings) list.push_back(building_json(building));
  return list;
}

ordered_json units_json(const StudyUnits& units) {
  return {{"force", units.force}, {"length", units.length}, {"mass", units.name(Dimension::mass)}};
}

void add_record(const Accelerogram& record, ordered_json& json) {
  const PeakSample peak = peak_of(record);
  json["samples"] = record.samples.size();
  json["step_s"] = record.step;
  json["first_sample_at_s"] = record.first_sample_at;
  json["last_sample_at_s"] = record.duration();
  json["peak_m_per_s2"] = peak.value;
  json["peak_at_s"] = peak.time;
}

ordered_json motions_json(const Study& study) {
  ordered_json list = ordered_json::array();
  for (const Motion& motion : study.motions) {
    ordered_json json = {{"name", motion.name},         {"file", motion.file},     {"format", motion.format},
                         {"unit_in_file", motion.unit}, {"factor", motion.factor}, {"digest", motion.digest}};
    json["samples"] = motion.samples;
    json["step_s"] = motion.step;
    json["first_sample_at_s"] = motion.first_sample_at;
    json["last_sample_at_s"] = motion.duration();
    json["peak_m_per_s2"] = motion.peak.value;
    json["peak_at_s"] = motion.peak.time;
    list.push_back(json);
  }
  return list;
}

ordered_json loads_json(const Study& study) {
  ordered_json forces = ordered_json::array();
  for (const FloorForce& force : study.forces)
    forces.push_back({{"floor", force.floor}, {"times_s", force.times}, {"forces_N", force.forces}});
  return {{"forces", forces},
          {"initial_displacement_m", study.initial_displacement},
          {"initial_velocity_m_per_s", study.initial_velocity}};
}

ordered_json march_json(const MarchSettings& march) {
  ordered_json json = {{"scheme", march.scheme.name}};
  for (const Method& method : scheme_catalogue())
    if (method.name == march.scheme.name) json["parameters"] = parameters_json(method.parameters, march.scheme.values);
  json["step_s"] = march.step ? ordered_json(*march.step) : ordered_json("auto");
  if (march.duration)
    json["duration_s"] = *march.duration;
  else
    json["tail_s"] = march.tail;
  json["error_check"] = march.error_check;
  json["collapse_drift_ratio"] = march.collapse_drift_ratio;
  json["tolerance"] = march.tolerance;
  json["halvings"] = march.halvings;
  return json;
}

ordered_json limits_json(const Study& study) {
  ordered_json list = ordered_json::array();
  for (const Limit& limit : study.limits)
    list.push_back({{"quantity", limit.quantity->name},
                    {"statistic", statistic_text(limit)},
                    {"value", limit.value},
                    {"unit", si_unit(limit.quantity->dimension)},
                    {"factors", limit.factors.empty() ? study.factors : limit.factors},
                    {"source", limit.source}});
  return list;
}

}  // namespace

nlohmann::ordered_json study_json(const Study& study) {
  ordered_json histories = ordered_json::array();
  for (const Quantity* quantity : study.keep.histories) histories.push_back(quantity->name);
  return {{"file", study.file.string()},
          {"kind", "study"},
          {"title", study.title},
          {"units", units_json(study.units)},
          {"buildings", buildings_json(study)},
          {"motions", motions_json(study)},
          {"factors", study.factors},
          {"loads", loads_json(study)},
          {"march", march_json(study.march)},
          {"keep",
           {{"histories", histories},
            {"every", study.keep.every},
            {"precision", study.keep.format.single ? "single" : "double"},
            {"compression", study.keep.format.compression}}},
          {"limits", limits_json(study)},
          {"runs", run_count(study)},
          {"notes", study.notes}};
}

nlohmann::ordered_json building_file_json(const StudyBuilding& building) {
  return {{"file", building.file.string()},
          {"kind", "building"},
          {"title", building.title},
          {"units", units_json(building.units)},
          {"building", building_json(building)}};
}

nlohmann::ordered_json record_json(const std::string& file, const FileOfRecords& records) {
  ordered_json components = ordered_json::array();
  for (const RecordComponent& component : records.components) {
    ordered_json json = {{"name", component.name}};
    if (component.channel) json["channel"] = *component.channel;
    if (component.azimuth) json["azimuth_deg"] = *component.azimuth;
    json["unit_in_file"] = component.unit;
    add_record(component.record, json);
    json["duration_s"] = component.record.duration() - component.record.first_sample_at;
    json["notes"] = component.notes;
    components.push_back(json);
  }
  return {{"file", file},
          {"kind", "record"},
          {"format", records.format},
          {"components", components},
          {"notes", records.notes}};
}

}  // namespace pilotis
