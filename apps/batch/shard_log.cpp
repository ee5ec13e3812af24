#include "apps/batch/shard_log.hpp"

#include <fcntl.h>
#include <fmt/chrono.h>
#include <fmt/format.h>
#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <ctime>
#include <nlohmann/json.hpp>
#include <system_error>

#include "core/error.hpp"

namespace pilotis {

namespace {

[[noreturn]] void fail(const std::filesystem::path& file, int number) {
  throw outside_error(file.string(), fmt::format("cannot be written: {}", std::generic_category().message(number)),
                      "check that the folder is there, that you may write in it and that the disk has room");
}

}  // namespace

ShardLog::ShardLog(const std::filesystem::path& file) : file_(file) {
  if (file.empty()) return;
  descriptor_ = ::open(file.c_str(), O_CREAT | O_WRONLY | O_APPEND | O_CLOEXEC, 0666);
  if (descriptor_ < 0) fail(file_, errno);
}

ShardLog::~ShardLog() {
  if (descriptor_ >= 0) ::close(descriptor_);
}

void ShardLog::add(const MarchedShard& shard, const Shard& cut, int rank) {
  if (descriptor_ < 0) return;
  const nlohmann::ordered_json json{{"time", fmt::format("{:%Y-%m-%dT%H:%M:%SZ}", fmt::gmtime(std::time(nullptr)))},
                                    {"shard", shard.shard},
                                    {"first_run", cut.first},
                                    {"runs", cut.count},
                                    {"failures", failures_in(shard.results)},
                                    {"march_seconds", shard.seconds},
                                    {"rank", rank}};
  const std::string line = json.dump() + "\n";
  const ssize_t written = ::write(descriptor_, line.data(), line.size());
  if (written != static_cast<ssize_t>(line.size())) fail(file_, written < 0 ? errno : ENOSPC);
}

long failures_in(const std::vector<RunResult>& results) {
  return std::count_if(results.begin(), results.end(),
                       [](const RunResult& run) { return run.status != RunStatus::done; });
}

}  // namespace pilotis
