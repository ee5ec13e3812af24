#include "io/results/held_file.hpp"

#include <fcntl.h>
#include <sys/file.h>
#include <unistd.h>

#include <cerrno>

#include "core/error.hpp"

namespace pilotis {

void refuse_if_held(const std::filesystem::path& file) {
  const int opened = ::open(file.c_str(), O_RDONLY | O_CLOEXEC);
  if (opened < 0) return;  // not there, or not to be read: nothing to find out
  const bool held = ::flock(opened, LOCK_EX | LOCK_NB) != 0 && errno == EWOULDBLOCK;
  ::close(opened);
  if (held)
    throw outside_error(file.string(), "is open in another program, so it was not replaced",
                        "close it there and start the same command again, or give another name with --output");
}

}  // namespace pilotis
