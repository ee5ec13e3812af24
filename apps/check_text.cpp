#include <fmt/format.h>
#include <fmt/ranges.h>

#include <cmath>

#include "apps/check_show.hpp"
#include "apps/engine.hpp"
#include "apps/text_table.hpp"
#include "core/laws/law_values.hpp"
#include "integrators/catalogue.hpp"
#include "io/records/components.hpp"

namespace pilotis {

namespace {

using Align = TextTable::Align;

std::string number(double value) { return fmt::format("{:.6g}", value); }

// In the study's unit, without its name.
std::string in_units(double si, Dimension dimension, const StudyUnits& units) {
  return number(si / units.factor(dimension));
}

// In the study's unit, with its name.
std::string with_unit(double si, Dimension dimension, const StudyUnits& units) {
  const std::string value = in_units(si, dimension, units);
  return dimension == Dimension::none ? value : value + " " + units.name(dimension);
}

std::string titled(const std::string& title, Dimension dimension, const StudyUnits& units) {
  return fmt::format("{} ({})", title, units.name(dimension));
}

std::string law_text(const Law& law, const StudyUnits& units) {
  const Method& method = law_method(law);
  const std::vector<double> values = law_values(law);
  std::vector<std::string> parts;
  for (std::size_t i = 0; i < values.size(); ++i)
    parts.push_back(
        fmt::format("{} {}", method.parameters[i].key, with_unit(values[i], method.parameters[i].dimension, units)));
  return fmt::format("{}: {}", method.name, fmt::join(parts, ", "));
}

std::string stories_table(const Study& study) {
  const StudyUnits& units = study.units;
  TextTable table({{"story"},
                   {"label", Align::left},
                   {titled("height", Dimension::length, units)},
                   {titled("floor weight", Dimension::force, units)},
                   {titled("floor mass", Dimension::mass, units)},
                   {titled("dashpot", Dimension::dashpot, units)},
                   {"spring", Align::left}});
  for (std::size_t i = 0; i < study.building.stories.size(); ++i) {
    const Story& story = study.building.stories[i];
    table.add_row({fmt::format("{}", i + 1), story.label, in_units(story.height, Dimension::length, units),
                   in_units(story.mass * study.building.gravity, Dimension::force, units),
                   in_units(story.mass, Dimension::mass, units), in_units(story.dashpot, Dimension::dashpot, units),
                   law_text(story.spring, units)});
  }
  return table.text();
}

std::string building_text(const Study& study) {
  const Stick& stick = study.building;
  double height = 0, mass = 0;
  for (const Story& story : stick.stories) {
    height += story.height;
    mass += story.mass;
  }
  const StudyUnits& units = study.units;
  return fmt::format("building: stick, {} {}, height {}, weight {}, P-Delta {}, gravity {:.6g} m/s2\n{}damping: {}\n",
                     stick.stories.size(), stick.stories.size() == 1 ? "story" : "stories",
                     with_unit(height, Dimension::length, units),
                     with_unit(mass * stick.gravity, Dimension::force, units), stick.p_delta ? "on" : "off",
                     stick.gravity, stories_table(study), damping_text(stick.damping));
}

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
    const PeakSample peak = peak_of(motion.record);
    table.add_row({motion.name, fmt::format("{}", motion.record.samples.size()), number(motion.record.step),
                   number(motion.record.duration()), fmt::format("{:.4g}", peak.value / standard_gravity),
                   fmt::format("{:.4g}", peak.value), number(peak.time), number(motion.factor), motion.unit,
                   motion.format, motion.file});
  }
  return fmt::format("motions: {} (peaks with the motion's own factor)\n{}", study.motions.size(), table.text());
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
  return fmt::format("histories kept: {}; every {}\n", fmt::join(names, ", "),
                     keep.every == 1 ? "step" : fmt::format("{} steps", keep.every));
}

std::string limit_text(const Limit& limit, const StudyUnits& units) {
  const std::string text = with_unit(limit.value, limit.quantity->dimension, units);
  return limit.quantity->dimension == Dimension::acceleration
             ? fmt::format("{} ({:.6g} g)", text, limit.value / standard_gravity)
             : text;
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
  const StudyUnits& units = study.units;
  std::string text = fmt::format("{}: study \"{}\"\n", study.file.string(), study.title);
  text += fmt::format("units of bare numbers: force {}, length {}, mass {}, time s\n", units.force, units.length,
                      units.name(Dimension::mass));
  text += building_text(study) + motions_text(study) + loads_text(study);
  text += fmt::format("factors: {:g}\n", fmt::join(study.factors, ", "));
  text += march_text(study.march) + keep_text(study.keep) + limits_text(study);
  return text + fmt::format("runs: {}\n", run_count(study));
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
    table.add_row({component_label(component), component.azimuth ? number(*component.azimuth) : "-",
                   fmt::format("{}", record.samples.size()), number(record.step), number(record.first_sample_at),
                   number(record.duration() - record.first_sample_at),
                   fmt::format("{:.4g}", peak.value / standard_gravity), number(peak.value), number(peak.time),
                   component.unit});
  }
  return fmt::format("{}: record, format {}\n{}", file, records.format, table.text());
}

}  // namespace pilotis
