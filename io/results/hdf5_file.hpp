// HDF5 files of ours: how they are made and opened.
#pragma once

#include <H5Cpp.h>

#include <filesystem>
#include <functional>
#include <span>
#include <string>

#include "io/results/disk_driver.hpp"
#include "io/results/hdf5_error.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

enum class MadeIn { memory, disk };

// A file in the making: in memory, or on disk beside its target under a passing name. Put in place whole or not at all.
class NewFile {
 public:
  // Throws Error (outside) when the target's folder cannot be written.
  NewFile(const std::filesystem::path& target, MadeIn where);
  ~NewFile();
  NewFile(const NewFile&) = delete;
  NewFile& operator=(const NewFile&) = delete;

  // What the library or the disk could not do becomes an Error (outside).
  void work(const std::function<void(H5::H5File&)>& act);

  // Closes, syncs, renames. In memory only: what `preamble` makes of the file's bytes stands before them, as the user
  // block of HDF5, 512 bytes or a larger power of two.
  void commit(const std::function<std::string(std::span<const char> bytes)>& preamble = {});

 private:
  void write_image(const std::function<std::string(std::span<const char>)>& preamble);
  void require_no_failure() const;

  std::filesystem::path target_;
  MadeIn where_;
  WholeFile whole_;
  DiskFile disk_;
  H5::H5File file_;
};

// For reading. Throws H5::Exception.
H5::H5File open_hdf5(const std::filesystem::path& path);

// Reads by `act`, quietly; what the library could not do becomes an Error (input) that calls `path` damaged.
void reading(const std::filesystem::path& path, const std::function<void()>& act);

}  // namespace pilotis
