// The parts of a result that is being made: a folder beside the result file with one file for each shard that is whole.
#pragma once

#include <filesystem>
#include <optional>
#include <span>
#include <string>
#include <vector>

#include "core/response/history_format.hpp"
#include "core/response/results.hpp"
#include "io/results/shard_key.hpp"

namespace pilotis {

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

  // The seal of a whole shard. Throws Error (outside) when it is not whole.
  ShardSeal whole(std::size_t shard) const;

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
  void require_key() const;
  void write_key() const;
  void give_lock_back();
  std::optional<ShardSeal> seal_of(std::size_t shard, std::string* note) const;

  std::filesystem::path folder_;
  ShardKey key_;
  const std::vector<BuildingSummary>& buildings_;
  HistoryFormat histories_;
  int lock_ = -1;  // descriptor that holds it; -1: none
};

}  // namespace pilotis
