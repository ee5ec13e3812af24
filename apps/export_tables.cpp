#include "apps/export_tables.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <iterator>

namespace pilotis {

namespace {

// Shortest text that reads back to the same double; empty for what is not known, as CSV readers expect.
std::string cell(double value) { return std::isnan(value) ? "" : fmt::format("{}", value); }

const char* per_name(Per per) { return per == Per::story ? "story" : per == Per::floor ? "floor" : "run"; }

// The columns that say which run a row is of.
std::string run_cells(const NumberedRun& of) {
  return fmt::format("{},{},{},{},{}", of.number, csv_cell(of.building.name), csv_cell(of.run.motion),
                     cell(of.run.factor), status_name(of.run.status));
}
constexpr const char* run_header = "run,building,motion,factor [1],status";

// The columns that say of what a value is: name, per, number.
std::string place_cells(const Quantity& quantity, std::size_t index) {
  if (quantity.per == Per::run) return fmt::format("{},run,", quantity.name);
  return fmt::format("{},{},{}", quantity.name, per_name(quantity.per), index + 1);
}

// One value per mode and floor or one per mode: property, story or floor, mode, value, unit; `who` is the building.
void add_modes(std::string& text, const std::string& who, const BuildingSummary& building, const TableUnits& units) {
  for (std::size_t m = 0; m < building.modes.size(); ++m) {
    const Mode& mode = building.modes[m];
    text += fmt::format("{},period,,,{},,{},s\n", who, m + 1, cell(mode.period));
    text += fmt::format("{},participation,,,{},,{},1\n", who, m + 1, cell(mode.participation));
    text +=
        fmt::format("{},effective_mass,,,{},,{},{}\n", who, m + 1,
                    cell(mode.effective_mass / units.factor(Dimension::mass)), csv_cell(units.name(Dimension::mass)));
    text += fmt::format("{},damping_ratio,,,{},,{},1\n", who, m + 1, cell(mode.damping_ratio));
    for (std::size_t floor = 0; floor < mode.shape.size(); ++floor)
      text += fmt::format("{},shape,floor,{},{},,{},1\n", who, floor + 1, m + 1, cell(mode.shape[floor]));
  }
}

}  // namespace

std::string csv_cell(const std::string& text) {
  if (text.find_first_of(",\"\r\n") == std::string::npos) return text;
  std::string quoted = "\"";
  for (char c : text) {
    if (c == '"') quoted += '"';
    quoted += c;
  }
  return quoted + "\"";
}

std::string peaks_header() {
  return fmt::format("{},quantity,per,number,value,step_error,unit,time [s]\n", run_header);
}

std::string peaks_rows(const NumberedRun& of, const TableUnits& units) {
  const ResponseLayout layout(static_cast<int>(of.building.heights.size()));
  const std::string who = run_cells(of);
  std::string text;
  for (const Quantity& quantity : quantities()) {
    const double factor = units.factor(quantity.dimension);
    const std::string unit = csv_cell(units.name(quantity.dimension));
    for (std::size_t i = 0; i < layout.count(quantity); ++i) {
      const Peak& peak = of.run.peaks.at(layout.offset(quantity) + i);
      text += fmt::format("{},{},{},{},{},{}\n", who, place_cells(quantity, i), cell(peak.value / factor),
                          cell(peak.step_error / factor), unit, cell(peak.time));
    }
  }
  return text;
}

std::string residuals_header(const TableUnits& units) {
  return fmt::format("{0},story,drift [{1}],drift_swing [{1}],drift_step_error [{1}],drift_ratio [1]\n", run_header,
                     units.name(Dimension::length));
}

std::string residuals_rows(const NumberedRun& of, const TableUnits& units) {
  const double factor = units.factor(Dimension::length);
  const RunResult& run = of.run;
  std::string text;
  for (std::size_t story = 0; story < run.residual_drift.size(); ++story)
    text += fmt::format("{},{},{},{},{},{}\n", run_cells(of), story + 1, cell(run.residual_drift[story] / factor),
                        cell(run.residual_swing.at(story) / factor), cell(run.residual_error.at(story) / factor),
                        cell(run.residual_drift[story] / of.building.heights.at(story)));
  return text;
}

std::string runs_header(const TableUnits& units) {
  return fmt::format(
      "{0},status_note,scheme,step [s],step_choice,time_reached [s],energy_error [1],energy_input [{1}],"
      "energy_damping [{1}],energy_absorbed [{1}],wall_time [s]\n",
      run_header, units.name(Dimension::moment));
}

std::string runs_rows(const NumberedRun& of, const TableUnits& units) {
  const double moment = units.factor(Dimension::moment);  // energy has the dimension of a moment
  const RunResult& run = of.run;
  return fmt::format("{},{},{},{},{},{},{},{},{},{},{}\n", run_cells(of), csv_cell(run.status_note),
                     csv_cell(run.scheme), cell(run.step), csv_cell(run.step_choice), cell(run.time_reached),
                     cell(run.energy_error), cell(run.energy_input / moment), cell(run.energy_damping / moment),
                     cell(run.energy_absorbed / moment), cell(run.wall_time));
}

std::string motions_csv(const std::vector<MotionSummary>& motions, const TableUnits& units) {
  std::string text =
      fmt::format("motion,name,file,digest,step [s],samples,peak [{}]\n", units.name(Dimension::acceleration));
  for (std::size_t i = 0; i < motions.size(); ++i)
    text += fmt::format("{},{},{},{},{},{},{}\n", i, csv_cell(motions[i].name), csv_cell(motions[i].file),
                        motions[i].digest, cell(motions[i].step), motions[i].samples,
                        cell(motions[i].peak / units.factor(Dimension::acceleration)));
  return text;
}

std::string building_header() { return "building,property,per,number,mode,label,value,unit\n"; }

std::string building_rows(const BuildingSummary& building, const TableUnits& units) {
  const std::string who = csv_cell(building.name);
  std::string text;
  for (std::size_t i = 0; i < building.heights.size(); ++i)
    text += fmt::format("{},height,story,{},,{},{},{}\n", who, i + 1, csv_cell(building.labels.at(i)),
                        cell(building.heights[i] / units.factor(Dimension::length)),
                        csv_cell(units.name(Dimension::length)));
  for (std::size_t i = 0; i < building.masses.size(); ++i)
    text +=
        fmt::format("{},mass,floor,{},,,{},{}\n", who, i + 1, cell(building.masses[i] / units.factor(Dimension::mass)),
                    csv_cell(units.name(Dimension::mass)));
  add_modes(text, who, building, units);
  return text;
}

std::string history_header() { return fmt::format("{},time [s],quantity,per,number,value,unit\n", run_header); }

std::string history_rows(const NumberedRun& of, const TableUnits& units) {
  const ResponseLayout layout(static_cast<int>(of.building.heights.size()));
  const std::string who = run_cells(of);
  std::string text;
  for (const History& history : of.run.histories) {
    const Quantity& quantity = *history.quantity;
    const double factor = units.factor(quantity.dimension);
    const std::string unit = csv_cell(units.name(quantity.dimension));
    const std::size_t places = layout.count(quantity);
    for (std::size_t i = 0; i < history.values.size(); ++i)
      fmt::format_to(std::back_inserter(text), "{},{},{},{},{}\n", who, cell(of.run.times.at(i / places)),
                     place_cells(quantity, i % places), cell(history.values[i] / factor), unit);
  }
  return text;
}

}  // namespace pilotis
