#include <fmt/format.h>

#include "io/results/axes.hpp"
#include "io/results/group_reader.hpp"
#include "io/results/group_writer.hpp"
#include "io/results/groups.hpp"

namespace pilotis {

namespace {

void write_one(H5::H5File& file, const std::string& path, const RunResult& run, int stories) {
  GroupWriter group(file, path);
  group.attribute("motion", run.motion);
  group.attribute("factor", run.factor);
  group.scale("time", run.times, "s", "time since the start of the run");
  write_places(group, stories);
  for (const History& history : run.histories)
    group.numbers(std::string(history.quantity->name), axes_of("time", *history.quantity), history.values,
                  si_unit(history.quantity->dimension), history.quantity->long_name, Packing::compressed);
}

}  // namespace

void write_histories(H5::H5File& file, const StudyResults& results) {
  const GroupWriter parent(file, "/histories");
  const int stories = static_cast<int>(results.building.heights.size());
  for (std::size_t i = 0; i < results.runs.size(); ++i)
    if (!results.runs[i].times.empty()) write_one(file, fmt::format("/histories/{}", i), results.runs[i], stories);
}

void read_history(const ResultFile& from, int run, int stories, RunResult& into) {
  into.times.clear();
  into.histories.clear();
  const GroupReader parent(from.file, from.where, "/histories");
  if (!parent.has(std::to_string(run))) return;
  const GroupReader group(from.file, from.where, fmt::format("/histories/{}", run));
  const std::size_t instants = group.length("time");
  into.times = group.numbers("time", instants);
  const ResponseLayout layout(stories);
  for (const Quantity& quantity : quantities()) {
    const std::string name(quantity.name);
    if (!group.has(name)) continue;
    into.histories.push_back({&quantity, group.numbers(name, instants * layout.count(quantity))});
  }
}

}  // namespace pilotis
