// Writes a result file run by run, in any order, in memory that does not grow with the number of runs.
#pragma once

#include <filesystem>
#include <memory>
#include <span>

#include "core/response/history_format.hpp"
#include "io/results/shard_folder.hpp"
#include "io/results/study_header.hpp"

namespace pilotis {

// The HDF5 library serves one thread at a time: of all writers, tables and shard folders of a process, one may be at
// work at any moment. The caller sees to that.
//
// The file is made in memory when it is small, beside the target under a passing name when it is not, and takes the
// target's place in finish(): the target is whole or untouched, and nothing else is left. Equal results give equal
// arrays (but wall_time and `created`) in whatever order they are added; added in the same order, equal bytes.
class ResultWriter {
 public:
  // For `runs` runs. `history_bytes` is what the histories of all of them take before compression, as far as known: it
  // helps to choose between memory and disk. Throws Error (outside) when the target's folder cannot be written.
  ResultWriter(const std::filesystem::path& target, StudyHeader header, std::size_t runs, HistoryFormat histories = {},
               double history_bytes = 0);
  ~ResultWriter();  // without finish(): leaves nothing
  ResultWriter(const ResultWriter&) = delete;
  ResultWriter& operator=(const ResultWriter&) = delete;

  // Rows first_run, first_run + 1, ... Throws Error (outside), e.g. on a full disk: then only the destructor is left.
  void add(std::size_t first_run, std::span<const RunResult> results);

  // As add(), from a shard that is whole; histories are copied as they are stored. Throws Error (outside) when it is
  // not whole; nothing of it is taken then.
  void add_shard(const ShardFolder& folder, std::size_t shard);

  // Judges, writes the verdict, syncs, renames. Once, after every run was added (std::logic_error otherwise). Throws
  // Error (outside), also when another process holds the target open.
  Verdict finish();

 private:
  struct Parts;
  std::unique_ptr<Parts> parts_;
};

}  // namespace pilotis
