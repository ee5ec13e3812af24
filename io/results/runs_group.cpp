// /motions and /runs: one value per motion, one value per run.
#include <fmt/format.h>

#include <functional>
#include <stdexcept>

#include "core/error.hpp"
#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

// A column of a table of T, from a member or a function of one row.
template <class V, class T, class Get>
std::vector<V> column(const std::vector<T>& rows, Get get) {
  std::vector<V> values;
  for (const T& row : rows) values.push_back(V(std::invoke(get, row)));
  return values;
}

struct NumberColumn {
  const char* name;
  double RunResult::*member;
  const char* units;
  const char* long_name;
};

constexpr NumberColumn number_columns[] = {
    {"factor", &RunResult::factor, "1", "factor on the ground motion"},
    {"step", &RunResult::step, "s", "time step; for adaptive schemes the interval between kept states"},
    {"time_reached", &RunResult::time_reached, "s", "time the march reached"},
    {"energy_error", &RunResult::energy_error, "1", "largest imbalance of energy over the largest input energy"},
    {"energy_input", &RunResult::energy_input, "J", "energy put in, at the end of the run"},
    {"energy_damping", &RunResult::energy_damping, "J", "energy lost in damping, at the end of the run"},
    {"energy_absorbed", &RunResult::energy_absorbed, "J", "energy absorbed by yielding, at the end of the run"},
    {"wall_time", &RunResult::wall_time, "s", "time the march took on the machine"}};

struct TextColumn {
  const char* name;
  std::string RunResult::*member;
  const char* long_name;
};

constexpr TextColumn text_columns[] = {
    {"motion", &RunResult::motion, "name of the motion"},
    {"scheme", &RunResult::scheme, "time-integration method with its parameters"},
    {"step_choice", &RunResult::step_choice, "why this time step"},
    {"status_note", &RunResult::status_note, "where and when a run ended early; empty when done"}};

}  // namespace

void write_motions(H5::H5File& file, const std::vector<MotionSummary>& motions) {
  GroupWriter group(file, "/motions");
  if (motions.empty()) return;
  group.count_scale("motion", 0, motions.size(), "motion of the suite, counted from 0");
  group.texts("name", {"motion"}, column<std::string>(motions, &MotionSummary::name), "name of the motion");
  group.texts("file", {"motion"}, column<std::string>(motions, &MotionSummary::file), "file the motion was read from");
  group.texts("digest", {"motion"}, column<std::string>(motions, &MotionSummary::digest),
              "SHA-256 of step, first sample time and samples (little-endian doubles)");
  group.texts("processing", {"motion"}, column<std::string>(motions, &MotionSummary::processing),
              "what was done to the record before it was used, in order; empty: nothing");
  group.numbers("step", {"motion"}, column<double>(motions, &MotionSummary::step), "s", "interval between samples");
  group.integers("samples", {"motion"}, column<std::int64_t>(motions, &MotionSummary::samples), "number of samples");
  group.numbers("peak", {"motion"}, column<double>(motions, &MotionSummary::peak), si_unit(Dimension::acceleration),
                "ground acceleration of largest magnitude, with the motion's own factor");
}

std::vector<MotionSummary> read_motions(const ResultFile& from) {
  const GroupReader group(from.file, from.where, "/motions");
  const std::size_t count = group.length("motion");
  std::vector<MotionSummary> motions(count);
  if (count == 0) return motions;
  const auto names = group.texts("name", count), files = group.texts("file", count),
             digests = group.texts("digest", count), processing = group.texts("processing", count);
  const auto steps = group.numbers("step", count), samples = group.numbers("samples", count),
             peaks = group.numbers("peak", count);
  for (std::size_t i = 0; i < count; ++i)
    motions[i] = {names[i], files[i], digests[i], steps[i], static_cast<long>(samples[i]), peaks[i], processing[i]};
  return motions;
}

RowArrays make_runs(H5::H5File& file, RunRange runs) {
  GroupWriter group(file, "/runs");
  RowArrays arrays;
  if (runs.count == 0) return arrays;
  group.count_scale("run", static_cast<std::int64_t>(runs.first), runs.count, "run, counted from 0");
  arrays.add("building", group.empty_texts("building", {"run"}, "name of the building"));
  for (const TextColumn& text : text_columns)
    arrays.add(text.name, group.empty_texts(text.name, {"run"}, text.long_name));
  arrays.add("status", group.empty_texts("status", {"run"}, "done, collapsed or not converged"));
  for (const NumberColumn& number : number_columns)
    arrays.add(number.name, group.empty_numbers(number.name, {"run"}, number.units, number.long_name));
  return arrays;
}

void write_runs(RowArrays& arrays, std::size_t first, std::span<const RunResult> results, const Buildings& buildings) {
  const auto texts = [&](const char* name, auto text_of) {
    std::vector<const char*> pointers;
    for (const RunResult& run : results) pointers.push_back(text_of(run));
    write_rows(arrays.at(name), first, pointers);
  };
  texts("building",
        [&](const RunResult& run) { return buildings.at(static_cast<std::size_t>(run.building)).name.c_str(); });
  for (const TextColumn& text : text_columns)
    texts(text.name, [&](const RunResult& run) { return (run.*text.member).c_str(); });
  texts("status", [](const RunResult& run) { return status_name(run.status).data(); });  // of a literal: ends with 0
  for (const NumberColumn& number : number_columns) {
    std::vector<double> values;
    for (const RunResult& run : results) values.push_back(run.*number.member);
    write_rows(arrays.at(number.name), first, std::span<const double>(values));
  }
}

const char* number_column(double RunResult::*member) {
  for (const NumberColumn& number : number_columns)
    if (number.member == member) return number.name;
  throw std::logic_error("not a column of /runs");
}

RunStatus status_from(const std::string& name, const std::string& where) {
  for (RunStatus status : {RunStatus::done, RunStatus::collapsed, RunStatus::not_converged})
    if (status_name(status) == name) return status;
  throw input_error(where, fmt::format("the array /runs/status holds \"{}\"", name),
                    "allowed are done, collapsed, not converged");
}

BuildingIndex::BuildingIndex(const Buildings& buildings, std::string where) : where_(std::move(where)) {
  for (std::size_t i = 0; i < buildings.size(); ++i) index_.emplace(buildings[i].name, static_cast<int>(i));
}

int BuildingIndex::of(const std::string& name) const {
  const auto found = index_.find(name);
  if (found != index_.end()) return found->second;
  throw input_error(where_, fmt::format("the array /runs/building holds \"{}\"", name),
                    "give a result file that `pilotis run` wrote");
}

void read_runs(const ResultFile& from, RunRange all, std::size_t first, const Buildings& buildings,
               std::span<RunResult> results) {
  const GroupReader group(from.file, from.where, "/runs");
  const auto texts = [&](const char* name) {
    return read_texts(group.text_array(name, all.count), first, results.size());
  };
  const BuildingIndex index(buildings, from.where);
  const auto names = texts("building"), statuses = texts("status");
  for (std::size_t i = 0; i < results.size(); ++i) {
    results[i].building = index.of(names[i]);
    results[i].status = status_from(statuses[i], from.where);
  }
  for (const TextColumn& text : text_columns) {
    auto values = texts(text.name);
    for (std::size_t i = 0; i < results.size(); ++i) results[i].*text.member = std::move(values[i]);
  }
  std::vector<double> values(results.size());
  for (const NumberColumn& number : number_columns) {
    read_rows(group.number_array(number.name, all.count), first, values);
    for (std::size_t i = 0; i < results.size(); ++i) results[i].*number.member = values[i];
  }
}

}  // namespace pilotis
