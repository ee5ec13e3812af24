#include "apps/motion/json.hpp"

namespace pilotis {

namespace {

using nlohmann::ordered_json;

ordered_json spectrum_json(const ResponseSpectrum& spectrum) {
  ordered_json list = ordered_json::array();
  for (const SpectrumCurve& curve : spectrum.curves)
    list.push_back({{"damping_ratio", curve.damping_ratio},
                    {"period_s", spectrum.periods},
                    {"displacement_m", curve.displacement},
                    {"velocity_m_per_s", curve.velocity},
                    {"acceleration_m_per_s2", curve.acceleration},
                    {"pseudo_velocity_m_per_s", curve.pseudo_velocity},
                    {"pseudo_acceleration_m_per_s2", curve.pseudo_acceleration}});
  return list;
}

ordered_json inelastic_json(const InelasticCurve& curve, const InelasticRequest& held) {
  ordered_json points = ordered_json::array();
  for (const InelasticPoint& point : curve.points) {
    points.push_back({{"period_s", point.period},
                      {"yield_acceleration_m_per_s2", point.yield_acceleration},
                      {"strength_ratio", point.strength_ratio},
                      {"ductility", point.peak.ductility},
                      {"peak_displacement_m", point.peak.displacement},
                      {"residual_displacement_m", point.peak.residual}});
    if (held.held == InelasticRequest::Held::ductility) points.back()["found"] = word_of(point.found);
  }
  return {{"held", held.text},
          {"post_yield_ratio", held.post_yield_ratio},
          {"damping_ratio", curve.damping_ratio},
          {"points", points}};
}

void add_asked_for(const RecordNumbers& record, const MotionRequest& request, ordered_json& json) {
  if (request.spectrum) json["spectrum"] = spectrum_json(record.spectrum);
  if (request.inelastic) {
    json["inelastic"] = ordered_json::array();
    for (const InelasticCurve& curve : record.inelastic)
      json["inelastic"].push_back(inelastic_json(curve, *request.inelastic));
  }
  if (request.fourier)
    json["fourier"] = {{"frequency_Hz", record.fourier.frequencies}, {"amplitude_m_per_s", record.fourier.amplitudes}};
  if (request.histories)
    json["histories"] = {{"step_s", record.histories.step},
                         {"acceleration_m_per_s2", record.histories.acceleration},
                         {"velocity_m_per_s", record.histories.velocity},
                         {"displacement_m", record.histories.displacement}};
}

}  // namespace

ordered_json record_json(const RecordNumbers& record, const MotionRequest& request) {
  ordered_json measures = ordered_json::object();
  for (std::size_t i = 0; i < request.measures.size(); ++i)
    measures[std::string(request.measures[i]->name)] = record.measures[i];
  ordered_json json = {{"file", record.file},
                       {"component", record.component},
                       {"format", record.format},
                       {"unit_in_file", record.unit},
                       {"samples", record.samples},
                       {"step_s", record.record.step},
                       {"first_sample_at_s", record.record.first_sample_at},
                       {"peak_m_per_s2", record.peak.value},
                       {"peak_at_s", record.peak.time},
                       {"measures", measures},
                       {"notes", record.notes}};
  add_asked_for(record, request, json);
  return json;
}

ordered_json pair_json(const PairNumbers& pair) {
  ordered_json list = ordered_json::array();
  for (const RotatedSpectrum& spectrum : pair.spectra) {
    std::vector<double> median, largest;
    std::vector<int> directions;
    for (const RotatedPeak& peak : spectrum.displacement) {
      median.push_back(peak.median);
      largest.push_back(peak.largest);
      directions.push_back(peak.direction_of_largest);
    }
    list.push_back({{"damping_ratio", spectrum.damping_ratio},
                    {"period_s", spectrum.periods},
                    {"rotd50_displacement_m", median},
                    {"rotd100_displacement_m", largest},
                    {"rotd50_pseudo_acceleration_m_per_s2", spectrum.median_pseudo_acceleration},
                    {"rotd100_pseudo_acceleration_m_per_s2", spectrum.largest_pseudo_acceleration},
                    {"direction_of_rotd100_degree", directions}});
  }
  return {{"first", pair.first}, {"second", pair.second}, {"spectra", list}};
}

ordered_json failure_json(const std::string& file, const Error& error) {
  return {{"file", file}, {"where", error.where()}, {"found", error.problem()}, {"allowed", error.remedy()}};
}

ordered_json measure_units_json(const MotionRequest& request) {
  ordered_json units = ordered_json::object();
  for (const Measure* measure : request.measures)
    units[std::string(measure->name)] = std::string(si_unit(measure->dimension));
  return units;
}

}  // namespace pilotis
