// The parts of a result that is being made: a folder beside the result file with one file for each shard that is whole.
#pragma once

#include <filesystem>
#include <optional>
#include <span>
#include <string>
#include <vector>

#include "core/response/history_format.hpp"
#include "core/response/results.hpp"

namespace pilotis {

// What the shards of a folder belong to. Two with equal keys cut the same runs into the same shards.
struct ShardKey {
  std::string study_digest;  // SHA-256 of all that decides the results, 64 hexadecimal digits
  std::string program_version;
  std::size_t runs = 0, shards = 0;
};

// Several processes of one job share a folder: the first makes it and takes the lock, the others are started on it when
// it stands and take none.
enum class FolderLock { take, held_by_the_job };

// One thread at a time, as for ResultWriter. Different processes may write different shards.
class ShardFolder {
 public:
  static std::filesystem::path beside(const std::filesystem::path& result);  // <result>.shards

  // Opens the folder of `result` or makes it; removes what a killed process left half-written (FolderLock::take only).
  // Throws Error (input) when it holds shards of another key, telling what differs and what to do; Error (outside) when
  // another process uses it or it cannot be written. `buildings` must outlive it.
  ShardFolder(const std::filesystem::path& result, ShardKey key, const std::vector<BuildingSummary>& buildings,
              HistoryFormat histories = {}, FolderLock lock = FolderLock::take);
  ~ShardFolder();  // gives the lock back; the shards stay
  ShardFolder(const ShardFolder&) = delete;
  ShardFolder& operator=(const ShardFolder&) = delete;

  const std::filesystem::path& path() const { return folder_; }
  std::filesystem::path file(std::size_t shard) const;

  // There under its name, of this key and undamaged (its digest is computed). `note` tells why a file that is there
  // will not do; it is then as good as absent.
  bool is_whole(std::size_t shard, std::string* note = nullptr) const;

  // Written under a passing name, synced, renamed: there whole or not at all. Throws Error (outside).
  void write(std::size_t shard, std::size_t first_run, std::span<const RunResult> results) const;

  // With histories. Throws Error (outside) when it is not whole.
  std::vector<RunResult> read(std::size_t shard) const;

  // Removes the folder with everything of ours in it, when the result is in place. Gives the lock back.
  void remove();

 private:
  std::filesystem::path folder_;
  ShardKey key_;
  const std::vector<BuildingSummary>& buildings_;
  HistoryFormat histories_;
  int lock_ = -1;  // descriptor that holds it; -1: none
};

}  // namespace pilotis
