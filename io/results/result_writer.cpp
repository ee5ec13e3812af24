#include "io/results/result_writer.hpp"

#include <fmt/format.h>

#include <optional>
#include <set>
#include <stdexcept>

#include "io/results/file_runs.hpp"
#include "io/results/hdf5_file.hpp"
#include "io/results/held_file.hpp"
#include "io/results/response_rows.hpp"

namespace pilotis {

namespace {

constexpr double largest_in_memory = 8e6;  // bytes; the most this can add to the memory of a process

// Of the file, before compression.
double size_of(const StudyHeader& header, std::size_t runs, double history_bytes) {
  const auto stories = static_cast<double>(most_stories(header.buildings));
  const auto peaks = static_cast<double>(ResponseLayout(static_cast<int>(stories)).size());
  constexpr double texts = 600;  // of one run
  const double run = 8 * (3 * peaks + 5 * stories) + texts;
  const double building = 8 * (3 * stories * stories + 10 * stories);
  return static_cast<double>(runs) * run + static_cast<double>(header.buildings.size()) * building + history_bytes;
}

void require_names(const std::vector<BuildingSummary>& buildings) {
  std::set<std::string> names;
  for (const BuildingSummary& building : buildings)
    if (!names.insert(building.name).second)
      throw std::logic_error(fmt::format("two buildings are called \"{}\"", building.name));
}

}  // namespace

struct ResultWriter::Parts {
  Parts(const std::filesystem::path& to, StudyHeader study, std::size_t runs, double history_bytes)
      : target(to),
        header(std::move(study)),
        missing(runs),
        added(runs, false),
        file(to, size_of(header, runs, history_bytes) < largest_in_memory ? MadeIn::memory : MadeIn::disk) {}

  void mark(std::size_t first, std::size_t count) {
    for (std::size_t run = first; run < first + count; ++run) {
      if (added.at(run)) throw std::logic_error(fmt::format("run {} was added twice", run));
      added[run] = true;
    }
    missing -= count;
  }

  std::filesystem::path target;
  StudyHeader header;
  std::size_t missing;  // runs not added yet
  std::vector<bool> added;
  NewFile file;
  std::optional<ResponseRows> rows;
};

ResultWriter::ResultWriter(const std::filesystem::path& target, StudyHeader header, std::size_t runs,
                           HistoryFormat histories, double history_bytes) {
  require_names(header.buildings);
  refuse_if_held(target);
  parts_ = std::make_unique<Parts>(target, std::move(header), runs, history_bytes);
  Parts& parts = *parts_;
  parts.file.work([&](H5::H5File& file) {
    write_root(file, parts.header);
    write_buildings(file, parts.header.buildings);
    write_motions(file, parts.header.motions);
    parts.rows.emplace(file, RunRange{0, runs}, parts.header.buildings, histories);
  });
}

ResultWriter::~ResultWriter() = default;

void ResultWriter::add(std::size_t first_run, std::span<const RunResult> results) {
  parts_->mark(first_run, results.size());
  parts_->file.work([&](H5::H5File& file) { parts_->rows->add(file, first_run, results); });
}

void ResultWriter::add_shard(const ShardFolder& folder, std::size_t shard) {
  const ShardSeal seal = folder.whole(shard);
  parts_->mark(seal.first_run, seal.count);
  if (seal.count == 0) return;
  parts_->file.work([&](H5::H5File& file) {
    const ResultFile from{open_hdf5(folder.file(shard)), folder.file(shard).string()};
    parts_->rows->copy(file, from, {seal.first_run, seal.count});
  });
}

Verdict ResultWriter::finish() {
  Parts& parts = *parts_;
  if (parts.missing > 0) throw std::logic_error(fmt::format("{} runs were not added", parts.missing));
  Verdict verdict;
  parts.file.work([&](H5::H5File& file) {
    const auto& buildings = parts.header.buildings;
    verdict = judge(FileRuns({file, parts.target.string()}, buildings), parts.header.limits);
    write_verdict(file, parts.header.limits, buildings, verdict);
  });
  parts.rows.reset();
  parts.file.commit();
  return verdict;
}

}  // namespace pilotis
