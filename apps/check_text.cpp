#include <fmt/format.h>
#include <fmt/ranges.h>

#include <cmath>

#include "apps/batch/plan.hpp"
#include "apps/check_show.hpp"
#include "apps/text_table.hpp"
#include "apps/units_text.hpp"
#include "integrators/catalogue.hpp"
#include "io/records/components.hpp"

namespace pilotis {

namespace {

using Align = TextTable::Align;

std::string motions_text(const Study& study) {
  if (study.motions.empty()) return "motions: none\n";
  TextTable table({{"motion", Align::left},
                   {"samples"},
                   {"step (s)"},
                   {"ends at (s)"},
                   {"peak (g)"},
                   {"peak (m/s2)"},
                   {"at (s)"},
                   {"factor"},
                   {"unit in file", Align::left},
                   {"format", Align::left},
                   {"file", Align::left}});
  for (const Motion& motion : study.motions) {
    const PeakSample& peak = motion.peak;
    table.add_row({motion.name, fmt::format("{}", motion.samples), shown(motion.step), shown(motion.duration()),
                   fmt::format("{:.4g}", peak.value / standard_gravity), fmt::format("{:.4g}", peak.value),
                   shown(peak.time), shown(motion.factor), motion.unit, motion.format, motion.file});
  }
  std::string text =
      fmt::format("motions: {} (peaks with the motion's own factor)\n{}", study.motions.size(), table.text());
  for (const Motion& motion : study.motions)
    for (const std::string& line : motion.processing) text += fmt::format("  {}: {}\n", motion.name, line);
  return text;
}

std::string loads_text(const Study& study) {
  std::string text;
  for (const FloorForce& force : study.forces) {
    double peak = 0;
    for (const double value : force.forces)
      if (std::abs(value) > std::abs(peak)) peak = value;
    text += fmt::format("force on floor {}: {} points, {:.6g} to {:.6g} s, peak {}\n", force.floor, force.times.size(),
                        force.times.front(), force.times.back(), with_unit(peak, Dimension::force, study.units));
  }
  const auto state = [&](const char* name, const std::vector<double>& values, Dimension dimension) {
    std::vector<std::string> shown;
    for (const double value : values) shown.push_back(in_units(value, dimension, study.units));
    if (!shown.empty())
      text += fmt::format("initial {} of floors 1 to {}: {} {}\n", name, shown.size(), fmt::join(shown, ", "),
                          study.units.name(dimension));
  };
  state("displacement", study.initial_displacement, Dimension::length);
  state("velocity", study.initial_velocity, Dimension::velocity);
  return text;
}

std::string scheme_text(const SchemeChoice& scheme) {
  std::string text = scheme.name;
  for (const Method& method : scheme_catalogue())
    for (std::size_t i = 0; method.name == scheme.name && i < scheme.values.size(); ++i)
      text += fmt::format(", {} {:g}", method.parameters[i].key, scheme.values[i]);
  return text;
}

std::string march_text(const MarchSettings& march) {
  const std::string step = march.step ? fmt::format("{:g} s", *march.step) : "auto";
  const std::string end = march.duration ? fmt::format("each run lasts {:g} s", *march.duration)
                                         : fmt::format("{:g} s of free vibration after each motion", march.tail);
  return fmt::format(
      "march: {}; step {}; {}; error check {}; collapse at drift ratio {:g}; tolerance {:g}; at most {} halvings\n",
      scheme_text(march.scheme), step, end, march.error_check ? "on" : "off", march.collapse_drift_ratio,
      march.tolerance, march.halvings);
}

std::string keep_text(const KeepSettings& keep) {
  if (keep.histories.empty()) return "histories kept: none\n";
  std::vector<std::string_view> names;
  for (const Quantity* quantity : keep.histories) names.push_back(quantity->name);
  return fmt::format("histories kept: {}; every {}; {} precision, compression {}\n", fmt::join(names, ", "),
                     keep.every == 1 ? "step" : fmt::format("{} steps", keep.every),
                     keep.format.single ? "single" : "double", keep.format.compression);
}

std::string limit_text(const Limit& limit, const StudyUnits& units) {
  const std::string text = with_unit(limit.value, limit.quantity->dimension, units);
  return limit.quantity->dimension == Dimension::acceleration
             ? fmt::format("{} ({:.6g} g)", text, limit.value / standard_gravity)
             : text;
}

std::string units_text(const StudyUnits& units) {
  return fmt::format("units of bare numbers: force {}, length {}, mass {}, time s\n", units.force, units.length,
                     units.name(Dimension::mass));
}

std::string runs_text(const Study& study) {
  if (study.motions.empty()) return fmt::format("runs: {}\n", run_count(study));
  return fmt::format("runs: {} (buildings {} x motions {} x factors {})\n", run_count(study), study.buildings.size(),
                     study.motions.size(), study.factors.size());
}

std::string limits_text(const Study& study) {
  if (study.limits.empty()) return "limits: none\n";
  TextTable table({{"quantity", Align::left},
                   {"over the motions", Align::left},
                   {"at most", Align::left},
                   {"at factors", Align::left},
                   {"source", Align::left}});
  for (const Limit& limit : study.limits)
    table.add_row({std::string(limit.quantity->name), statistic_text(limit), limit_text(limit, study.units),
                   limit.factors.empty() ? "all" : fmt::format("{:g}", fmt::join(limit.factors, ", ")), limit.source});
  return fmt::format("limits: {}\n{}", study.limits.size(), table.text());
}

}  // namespace

std::string statistic_text(const Limit& limit) {
  if (limit.statistic != Statistic::percentile) return std::string(statistic_name(limit.statistic));
  return fmt::format("percentile {:g}", limit.percentile);
}

std::string study_text(const Study& study) {
  std::string text = fmt::format("{}: study \"{}\"\n", study.file.string(), study.title);
  text += units_text(study.units) + buildings_text(study) + motions_text(study) + loads_text(study);
  text += fmt::format("factors: {:g}\n", fmt::join(study.factors, ", "));
  return text + march_text(study.march) + keep_text(study.keep) + limits_text(study) + runs_text(study);
}

std::string building_file_text(const StudyBuilding& building) {
  return fmt::format("{}: building \"{}\"\n{}{}", building.file.string(), building.title, units_text(building.units),
                     building_text(building, building.units));
}

std::string record_text(const std::string& file, const FileOfRecords& records) {
  TextTable table({{"component", Align::left},
                   {"azimuth (deg)"},
                   {"samples"},
                   {"step (s)"},
                   {"starts at (s)"},
                   {"duration (s)"},
                   {"peak (g)"},
                   {"peak (m/s2)"},
                   {"at (s)"},
                   {"unit in file", Align::left}});
  for (const RecordComponent& component : records.components) {
    const Accelerogram& record = component.record;
    const PeakSample peak = peak_of(record);
    table.add_row({component_label(component), component.azimuth ? shown(*component.azimuth) : "-",
                   fmt::format("{}", record.samples.size()), shown(record.step), shown(record.first_sample_at),
                   shown(record.duration() - record.first_sample_at),
                   fmt::format("{:.4g}", peak.value / standard_gravity), shown(peak.value), shown(peak.time),
                   component.unit});
  }
  return fmt::format("{}: record, format {}\n{}", file, records.format, table.text());
}

}  // namespace pilotis
