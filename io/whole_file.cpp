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

void sync_folder(const fs::path& folder) {
  const int opened = ::open(folder.c_str(), O_RDONLY | O_DIRECTORY | O_CLOEXEC);
  if (opened < 0) fail(folder, "cannot be opened to be synced", errno);
  const int failed = ::fsync(opened) != 0 ? errno : 0;
  ::close(opened);
  if (failed != 0) fail(folder, "cannot be synced", failed);
}

fs::path passing_name(const fs::path& target, int attempt) {
  fs::path name = target;
  name += fmt::format(".partial-{}-{}", ::getpid(), attempt);
  return name;
}

}  // namespace

WholeFile::WholeFile(fs::path target) : target_(std::move(target)), folder_(target_.parent_path()) {
  if (folder_.empty()) folder_ = ".";
  std::error_code ignored;
  if (fs::is_directory(target_, ignored)) fail(target_, "cannot be written", EISDIR);
  for (int attempt = 0; file_ < 0; ++attempt) {
    passing_ = passing_name(target_, attempt);
    file_ = ::open(passing_.c_str(), O_CREAT | O_EXCL | O_RDWR | O_CLOEXEC, 0666);
    if (file_ < 0 && errno != EEXIST) fail(target_, "cannot be written", errno);
  }
}

WholeFile::~WholeFile() {
  if (file_ >= 0) ::close(file_);
  if (!committed_) ::unlink(passing_.c_str());
}

void WholeFile::write(std::span<const char> bytes) {
  while (!bytes.empty()) {
    const ssize_t written = ::write(file_, bytes.data(), bytes.size());
    if (written < 0 && errno == EINTR) continue;
    if (written < 0) fail(target_, "cannot be written", errno);
    bytes = bytes.subspan(static_cast<std::size_t>(written));
  }
}

void WholeFile::commit() {
  if (::fsync(file_) != 0) fail(target_, "cannot be synced", errno);
  const int closed = ::close(file_);
  file_ = -1;
  if (closed != 0) fail(target_, "cannot be closed", errno);
  if (std::rename(passing_.c_str(), target_.c_str()) != 0) fail(target_, "cannot be put in place", errno);
  committed_ = true;
  sync_folder(folder_);
}

}  // namespace pilotis
