// /motions and /runs: one value per motion, one value per run.
#include <fmt/format.h>

#include <functional>

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

RunStatus status_from(const std::string& name, const std::string& where) {
  for (RunStatus status : {RunStatus::done, RunStatus::collapsed, RunStatus::not_converged})
    if (status_name(status) == name) return status;
  throw input_error(where, fmt::format("the array /runs/status holds \"{}\"", name),
                    "allowed are done, collapsed, not converged");
}

}  // namespace

void write_motions(H5::H5File& file, const std::vector<MotionSummary>& motions) {
  GroupWriter group(file, "/motions");
  if (motions.empty()) return;
  group.count_scale("motion", 0, motions.size(), "motion of the suite, counted from 0");
  group.texts("name", {"motion"}, column<std::string>(motions, &MotionSummary::name), "name of the motion");
  group.texts("file", {"motion"}, column<std::string>(motions, &MotionSummary::file), "file the motion was read from");
  group.texts("digest", {"motion"}, column<std::string>(motions, &MotionSummary::digest),
              "SHA-256 of step, first sample time and samples (little-endian doubles)");
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
             digests = group.texts("digest", count);
  const auto steps = group.numbers("step", count), samples = group.numbers("samples", count),
             peaks = group.numbers("peak", count);
  for (std::size_t i = 0; i < count; ++i)
    motions[i] = {names[i], files[i], digests[i], steps[i], static_cast<long>(samples[i]), peaks[i]};
  return motions;
}

void write_runs(H5::H5File& file, const std::vector<RunResult>& runs) {
  GroupWriter group(file, "/runs");
  if (runs.empty()) return;
  group.count_scale("run", 0, runs.size(), "run, counted from 0");
  for (const TextColumn& text : text_columns)
    group.texts(text.name, {"run"}, column<std::string>(runs, text.member), text.long_name);
  group.texts("status", {"run"},
              column<std::string>(runs, [](const RunResult& run) { return status_name(run.status); }),
              "done, collapsed or not converged");
  for (const NumberColumn& number : number_columns)
    group.numbers(number.name, {"run"}, column<double>(runs, number.member), number.units, number.long_name);
}

std::vector<RunResult> read_runs(const ResultFile& from) {
  const GroupReader group(from.file, from.where, "/runs");
  const std::size_t count = group.length("run");
  std::vector<RunResult> runs(count);
  if (count == 0) return runs;
  for (const TextColumn& text : text_columns) {
    const auto values = group.texts(text.name, count);
    for (std::size_t i = 0; i < count; ++i) runs[i].*text.member = values[i];
  }
  for (const NumberColumn& number : number_columns) {
    const auto values = group.numbers(number.name, count);
    for (std::size_t i = 0; i < count; ++i) runs[i].*number.member = values[i];
  }
  const auto statuses = group.texts("status", count);
  for (std::size_t i = 0; i < count; ++i) runs[i].status = status_from(statuses[i], from.where);
  return runs;
}

}  // namespace pilotis
