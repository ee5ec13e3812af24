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

bool wanted(std::size_t i, int run) { return run < 0 || static_cast<std::size_t>(run) == i; }

// The columns that say which run a row is of.
std::string run_cells(const RunResult& run, std::size_t number) {
  return fmt::format("{},{},{},{}", number, csv_cell(run.motion), cell(run.factor), status_name(run.status));
}
constexpr const char* run_header = "run,motion,factor [1],status";

// The columns that say of what a value is: name, per, number.
std::string place_cells(const Quantity& quantity, std::size_t index) {
  if (quantity.per == Per::run) return fmt::format("{},run,", quantity.name);
  return fmt::format("{},{},{}", quantity.name, per_name(quantity.per), index + 1);
}

void add_peaks(std::string& text, const RunResult& run, std::size_t number, int stories, const TableUnits& units) {
  const ResponseLayout layout(stories);
  const std::string who = run_cells(run, number);
  for (const Quantity& quantity : quantities()) {
    const double factor = units.factor(quantity.dimension);
    const std::string unit = csv_cell(units.name(quantity.dimension));
    for (std::size_t i = 0; i < layout.count(quantity); ++i) {
      const Peak& peak = run.peaks.at(layout.offset(quantity) + i);
      text += fmt::format("{},{},{},{},{},{}\n", who, place_cells(quantity, i), cell(peak.value / factor),
                          cell(peak.step_error / factor), unit, cell(peak.time));
    }
  }
}

// One value per mode and floor or one per mode: property, story or floor, mode, value, unit.
void add_modes(std::string& text, const BuildingSummary& building, const TableUnits& units) {
  for (std::size_t m = 0; m < building.modes.size(); ++m) {
    const Mode& mode = building.modes[m];
    text += fmt::format("period,,,{},,{},s\n", m + 1, cell(mode.period));
    text += fmt::format("participation,,,{},,{},1\n", m + 1, cell(mode.participation));
    text +=
        fmt::format("effective_mass,,,{},,{},{}\n", m + 1, cell(mode.effective_mass / units.factor(Dimension::mass)),
                    csv_cell(units.name(Dimension::mass)));
    text += fmt::format("damping_ratio,,,{},,{},1\n", m + 1, cell(mode.damping_ratio));
    for (std::size_t floor = 0; floor < mode.shape.size(); ++floor)
      text += fmt::format("shape,floor,{},{},,{},1\n", floor + 1, m + 1, cell(mode.shape[floor]));
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

std::string peaks_csv(const StoredStudy& stored, const TableUnits& units, int run) {
  std::string text = fmt::format("{},quantity,per,number,value,step_error,unit,time [s]\n", run_header);
  const auto& results = stored.results;
  for (std::size_t i = 0; i < results.runs.size(); ++i)
    if (wanted(i, run)) add_peaks(text, results.runs[i], i, static_cast<int>(results.building.heights.size()), units);
  return text;
}

std::string residuals_csv(const StoredStudy& stored, const TableUnits& units, int run) {
  const std::string unit = units.name(Dimension::length);
  const double factor = units.factor(Dimension::length);
  std::string text =
      fmt::format("{0},story,drift [{1}],drift_swing [{1}],drift_step_error [{1}],drift_ratio [1]\n", run_header, unit);
  const auto& heights = stored.results.building.heights;
  for (std::size_t i = 0; i < stored.results.runs.size(); ++i) {
    const RunResult& one = stored.results.runs[i];
    if (!wanted(i, run)) continue;
    for (std::size_t story = 0; story < one.residual_drift.size(); ++story)
      text += fmt::format("{},{},{},{},{},{}\n", run_cells(one, i), story + 1, cell(one.residual_drift[story] / factor),
                          cell(one.residual_swing.at(story) / factor), cell(one.residual_error.at(story) / factor),
                          cell(one.residual_drift[story] / heights[story]));
  }
  return text;
}

std::string runs_csv(const StoredStudy& stored, const TableUnits& units, int run) {
  const double moment = units.factor(Dimension::moment);  // energy has the dimension of a moment
  const std::string unit = units.name(Dimension::moment);
  std::string text = fmt::format(
      "{0},status_note,scheme,step [s],step_choice,time_reached [s],energy_error [1],energy_input [{1}],"
      "energy_damping [{1}],energy_absorbed [{1}],wall_time [s]\n",
      run_header, unit);
  for (std::size_t i = 0; i < stored.results.runs.size(); ++i) {
    const RunResult& one = stored.results.runs[i];
    if (!wanted(i, run)) continue;
    text += fmt::format("{},{},{},{},{},{},{},{},{},{},{}\n", run_cells(one, i), csv_cell(one.status_note),
                        csv_cell(one.scheme), cell(one.step), csv_cell(one.step_choice), cell(one.time_reached),
                        cell(one.energy_error), cell(one.energy_input / moment), cell(one.energy_damping / moment),
                        cell(one.energy_absorbed / moment), cell(one.wall_time));
  }
  return text;
}

std::string motions_csv(const StoredStudy& stored, const TableUnits& units) {
  std::string text =
      fmt::format("motion,name,file,digest,step [s],samples,peak [{}]\n", units.name(Dimension::acceleration));
  const auto& motions = stored.results.motions;
  for (std::size_t i = 0; i < motions.size(); ++i)
    text += fmt::format("{},{},{},{},{},{},{}\n", i, csv_cell(motions[i].name), csv_cell(motions[i].file),
                        motions[i].digest, cell(motions[i].step), motions[i].samples,
                        cell(motions[i].peak / units.factor(Dimension::acceleration)));
  return text;
}

std::string building_csv(const StoredStudy& stored, const TableUnits& units) {
  const BuildingSummary& building = stored.results.building;
  std::string text = "property,per,number,mode,label,value,unit\n";
  for (std::size_t i = 0; i < building.heights.size(); ++i)
    text += fmt::format("height,story,{},,{},{},{}\n", i + 1, csv_cell(building.labels.at(i)),
                        cell(building.heights[i] / units.factor(Dimension::length)),
                        csv_cell(units.name(Dimension::length)));
  for (std::size_t i = 0; i < building.masses.size(); ++i)
    text += fmt::format("mass,floor,{},,,{},{}\n", i + 1, cell(building.masses[i] / units.factor(Dimension::mass)),
                        csv_cell(units.name(Dimension::mass)));
  add_modes(text, building, units);
  return text;
}

std::string history_header() { return fmt::format("{},time [s],quantity,per,number,value,unit\n", run_header); }

std::string history_rows(const RunResult& run, int number, int stories, const TableUnits& units) {
  const ResponseLayout layout(stories);
  const std::string who = run_cells(run, static_cast<std::size_t>(number));
  std::string text;
  for (const History& history : run.histories) {
    const Quantity& quantity = *history.quantity;
    const double factor = units.factor(quantity.dimension);
    const std::string unit = csv_cell(units.name(quantity.dimension));
    const std::size_t places = layout.count(quantity);
    for (std::size_t i = 0; i < history.values.size(); ++i)
      fmt::format_to(std::back_inserter(text), "{},{},{},{},{}\n", who, cell(run.times.at(i / places)),
                     place_cells(quantity, i % places), cell(history.values[i] / factor), unit);
  }
  return text;
}

}  // namespace pilotis
