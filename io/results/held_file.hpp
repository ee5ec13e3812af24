// Files other processes are at: the HDF5 library takes a lock (flock) on every file it opens.
#pragma once

#include <filesystem>

namespace pilotis {

// Throws Error (outside) when `file` is there and another opener of it, e.g. a reader of HDF5, has not closed it. Where
// the file system knows no locks, nothing is found.
void refuse_if_held(const std::filesystem::path& file);

}  // namespace pilotis
