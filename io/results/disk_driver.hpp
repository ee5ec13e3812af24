// A file driver for the HDF5 library that survives a full disk.
#pragma once

#include <H5Cpp.h>

#include <vector>

namespace pilotis {

// The library cannot close a file whose last writes fail: it keeps trying until the process ends. So what the disk does
// not take is kept in memory, where reads find it, and the library goes on in peace; who writes looks at `error` after
// every step, stops at the first one, closes the file and throws it away.
struct DiskFile {
  struct Kept {
    haddr_t at;
    std::vector<char> bytes;
  };
  int descriptor = -1;  // open for reading and writing, empty at first; not closed by the driver
  int error = 0;        // errno of the first write that failed; 0: none
  haddr_t end = 0;      // bytes in the file
  std::vector<Kept> kept;
};

// Makes `access` use the driver on `file`, which must outlive the HDF5 file.
void use_disk_driver(H5::FileAccPropList& access, DiskFile& file);

}  // namespace pilotis
