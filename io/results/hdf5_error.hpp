// Keeps the HDF5 library quiet and remembers the innermost reason of its last failure.
#pragma once

#include <H5Cpp.h>

#include <string>

namespace pilotis {

// While it lives, the library prints nothing; what it would have printed is asked for with reason().
class Hdf5Quiet {
 public:
  Hdf5Quiet();
  ~Hdf5Quiet();
  Hdf5Quiet(const Hdf5Quiet&) = delete;
  Hdf5Quiet& operator=(const Hdf5Quiet&) = delete;

  // In one line: the system's own words where there are any ("No space left on device"), the library's otherwise.
  const std::string& reason() const { return reason_; }

 private:
  std::string reason_;
  H5E_auto2_t former_ = nullptr;
  void* former_data_ = nullptr;
};

}  // namespace pilotis
