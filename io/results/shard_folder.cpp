#include "io/results/shard_folder.hpp"

#include <fcntl.h>
#include <fmt/format.h>
#include <signal.h>
#include <sys/file.h>
#include <unistd.h>

#include <cerrno>
#include <fstream>
#include <sstream>
#include <system_error>

#include "core/error.hpp"
#include "io/results/hdf5_file.hpp"
#include "io/results/response_rows.hpp"

namespace pilotis {

namespace {

namespace fs = std::filesystem;

constexpr const char* about_name = "about.txt";
constexpr const char* lock_name = "lock";
constexpr const char* partial_mark = ".partial-";

[[noreturn]] void fail(const fs::path& path, const std::string& what, const std::string& reason) {
  throw outside_error(path.string(), fmt::format("{}: {}", what, reason),
                      "check that you may write in the folder of the result file and that the disk has room");
}

std::vector<fs::path> entries(const fs::path& folder) {
  std::vector<fs::path> found;
  std::error_code error;
  for (fs::directory_iterator at(folder, error), end; !error && at != end; at.increment(error))
    found.push_back(at->path());
  if (error) fail(folder, "cannot be read", error.message());
  return found;
}

bool is_shard(const fs::path& file) {
  return file.filename().string().starts_with("shard-") && file.extension() == ".h5";
}

// A passing name ends in the number of the process that wrote it; one that lives on this machine goes on writing.
bool is_left_over(const fs::path& file) {
  const std::string name = file.filename().string();
  const auto mark = name.rfind(partial_mark);
  if (mark == std::string::npos) return false;
  const long process = std::strtol(name.c_str() + mark + std::char_traits<char>::length(partial_mark), nullptr, 10);
  return process > 0 && ::kill(static_cast<pid_t>(process), 0) != 0 && errno == ESRCH;
}

void remove_left_overs(const fs::path& folder, const std::string& beginning) {
  std::error_code ignored;
  for (const fs::path& file : entries(folder))
    if (file.filename().string().starts_with(beginning) && is_left_over(file)) fs::remove(file, ignored);
}

int taken_lock(const fs::path& folder) {
  const fs::path file = folder / lock_name;
  const int opened = ::open(file.c_str(), O_CREAT | O_RDWR | O_CLOEXEC, 0666);
  if (opened < 0) fail(file, "cannot be made", std::generic_category().message(errno));
  if (::flock(opened, LOCK_EX | LOCK_NB) == 0) return opened;
  const int reason = errno;
  ::close(opened);
  if (reason != EWOULDBLOCK) fail(file, "cannot be locked", std::generic_category().message(reason));
  throw outside_error(folder.string(), "another process is at work on this result",
                      "wait until it has ended or stop it, or give another name with --output");
}

std::string content_of(const fs::path& file) {
  std::ifstream in(file, std::ios::binary);
  std::ostringstream text;
  text << in.rdbuf();
  return text.str();
}

std::string difference(const ShardKey& found, const ShardKey& wanted) {
  if (found.program_version != wanted.program_version)
    return fmt::format("of program version {}, and this is version {}", found.program_version, wanted.program_version);
  if (found.study_digest != wanted.study_digest) return "of a study that has changed since";
  return fmt::format("of {} runs in {} shards, and the study has {} runs in {} shards", found.runs, found.shards,
                     wanted.runs, wanted.shards);
}

std::size_t shards_in(const fs::path& folder) {
  std::size_t count = 0;
  for (const fs::path& file : entries(folder)) count += is_shard(file);
  return count;
}

}  // namespace

fs::path ShardFolder::beside(const fs::path& result) {
  fs::path folder = result;
  folder += ".shards";
  return folder;
}

ShardFolder::ShardFolder(const fs::path& result, ShardKey key, const std::vector<BuildingSummary>& buildings,
                         HistoryFormat histories, FolderLock lock)
    : folder_(beside(result)), key_(std::move(key)), buildings_(buildings), histories_(histories) {
  if (lock == FolderLock::take) {
    std::error_code error;
    fs::create_directory(folder_, error);
    if (error) fail(folder_, "cannot be made", error.message());
    lock_ = taken_lock(folder_);
  }
  try {
    require_key();
    if (lock == FolderLock::held_by_the_job) return;
    const fs::path parent = result.parent_path();
    remove_left_overs(folder_, "");
    remove_left_overs(parent.empty() ? fs::path(".") : parent, result.filename().string() + partial_mark);
    write_key();
  } catch (...) {
    give_lock_back();
    throw;
  }
}

ShardFolder::~ShardFolder() { give_lock_back(); }

void ShardFolder::give_lock_back() {
  if (lock_ >= 0) ::close(lock_);
  lock_ = -1;
}

void ShardFolder::require_key() const {
  const auto found = key_from(content_of(folder_ / about_name));
  if (!found || *found == key_) return;
  const std::size_t shards = shards_in(folder_);
  if (shards == 0) return;  // nothing to lose
  throw input_error(folder_.string(), fmt::format("holds {} finished shards {}", shards, difference(*found, key_)),
                    "remove that folder to start anew, give another name with --output, or go on with the study as it "
                    "was");
}

void ShardFolder::write_key() const {
  const std::string text = key_text(key_);
  if (content_of(folder_ / about_name) == text) return;
  WholeFile file(folder_ / about_name);
  file.write(text);
  file.commit();
}

fs::path ShardFolder::file(std::size_t shard) const { return folder_ / fmt::format("shard-{:06}.h5", shard); }

std::optional<ShardSeal> ShardFolder::seal_of(std::size_t shard, std::string* note) const {
  std::error_code ignored;
  const fs::path path = file(shard);
  if (!fs::exists(path, ignored)) return {};
  std::string fault;
  auto seal = read_seal(path, fault);
  if (seal && seal->key != key_) fault = "it is " + difference(seal->key, key_);
  if (seal && seal->shard != shard) fault = fmt::format("it is shard {} under another name", seal->shard);
  if (fault.empty()) return seal;
  if (note) *note = fmt::format("{}: {}", path.string(), fault);
  return {};
}

bool ShardFolder::is_whole(std::size_t shard, std::string* note) const { return seal_of(shard, note).has_value(); }

ShardSeal ShardFolder::whole(std::size_t shard) const {
  std::string note;
  const auto seal = seal_of(shard, &note);
  if (seal) return *seal;
  throw outside_error(file(shard).string(),
                      note.empty() ? "the shard is missing" : "the shard is damaged (" + note + ")",
                      "start the same command again: the runs of this shard will be made anew");
}

void ShardFolder::write(std::size_t shard, std::size_t first_run, std::span<const RunResult> results) const {
  NewFile made(file(shard), MadeIn::memory);
  made.work([&](H5::H5File& file) {
    ResponseRows rows(file, {first_run, results.size()}, buildings_, histories_);
    rows.add(file, first_run, results);
  });
  const ShardSeal seal{key_, shard, first_run, results.size(), ""};
  made.commit([&](std::span<const char> content) { return seal_text(seal, content); });
}

std::vector<RunResult> ShardFolder::read(std::size_t shard) const {
  const ShardSeal seal = whole(shard);
  std::vector<RunResult> results(seal.count);
  reading(file(shard), [&] {
    const ResultFile from{open_hdf5(file(shard)), file(shard).string()};
    const RunRange all{seal.first_run, seal.count};
    if (seal.count == 0) return;
    read_runs(from, all, 0, buildings_, results);
    read_peaks(from, all, 0, buildings_, results);
    read_residuals(from, all, 0, buildings_, results);
    for (std::size_t i = 0; i < seal.count; ++i) read_history(from, seal.first_run + i, results[i]);
  });
  return results;
}

void ShardFolder::remove() {
  std::error_code ignored;
  for (const fs::path& file : entries(folder_))
    if (is_shard(file) || is_left_over(file)) fs::remove(file, ignored);
  fs::remove(folder_ / about_name, ignored);
  fs::remove(folder_ / lock_name, ignored);
  fs::remove(folder_, ignored);  // unless something of someone else's is in it
  give_lock_back();
}

}  // namespace pilotis
