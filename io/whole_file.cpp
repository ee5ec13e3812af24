#include "io/whole_file.hpp"

#include <fcntl.h>
#include <fmt/format.h>
#include <unistd.h>

#include <cerrno>
#include <cstdio>
#include <system_error>

#include "core/error.hpp"

namespace pilotis {

namespace {

namespace fs = std::filesystem;

std::string reason(int number) { return std::generic_category().message(number); }

[[noreturn]] void fail(const fs::path& path, const std::string& what, int number) {
  throw outside_error(path.string(), fmt::format("{}: {}", what, reason(number)),
                      "check that the folder exists, that you may write in it and that the disk has room");
}

void sync(const fs::path& path, int flags) {
  const int file = ::open(path.c_str(), flags | O_CLOEXEC);
  if (file < 0) fail(path, "cannot be opened to be synced", errno);
  const int failed = ::fsync(file) != 0 ? errno : 0;
  ::close(file);
  if (failed != 0) fail(path, "cannot be synced", failed);
}

// A file of this name that was not there before; empty when the name was taken.
fs::path made_new(const fs::path& target, int attempt) {
  fs::path name = target;
  name += fmt::format(".partial-{}-{}", ::getpid(), attempt);
  const int file = ::open(name.c_str(), O_CREAT | O_EXCL | O_WRONLY | O_CLOEXEC, 0666);
  if (file < 0 && errno == EEXIST) return {};
  if (file < 0) fail(target, "cannot be written", errno);
  ::close(file);
  return name;
}

}  // namespace

WholeFile::WholeFile(fs::path target) : target_(std::move(target)), folder_(target_.parent_path()) {
  if (folder_.empty()) folder_ = ".";
  std::error_code ignored;
  if (fs::is_directory(target_, ignored)) fail(target_, "cannot be written", EISDIR);
  for (int attempt = 0; passing_.empty(); ++attempt) passing_ = made_new(target_, attempt);
}

WholeFile::~WholeFile() {
  if (!committed_) ::unlink(passing_.c_str());
}

void WholeFile::commit() {
  sync(passing_, O_RDONLY);
  if (std::rename(passing_.c_str(), target_.c_str()) != 0) fail(target_, "cannot be put in place", errno);
  committed_ = true;
  sync(folder_, O_RDONLY | O_DIRECTORY);
}

}  // namespace pilotis
