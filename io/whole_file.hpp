// A file that is whole or untouched: written beside its place under a passing name, synced, then renamed.
#pragma once

#include <filesystem>
#include <span>

namespace pilotis {

class WholeFile {
 public:
  // Makes an empty file of a new name in the folder of `target`. Throws Error (outside) when the folder is missing or
  // not writable, or when `target` is a folder.
  explicit WholeFile(std::filesystem::path target);
  ~WholeFile();  // removes what commit() did not rename
  WholeFile(const WholeFile&) = delete;
  WholeFile& operator=(const WholeFile&) = delete;

  // Of the file under its passing name, for who writes it at chosen places; -1 after commit().
  int descriptor() const { return file_; }

  // Appends. Throws Error (outside).
  void write(std::span<const char> bytes);

  // Syncs the file, renames it to the target, syncs the folder. Throws Error (outside).
  void commit();

 private:
  std::filesystem::path target_, folder_, passing_;
  int file_ = -1;  // descriptor of passing_; -1 once it is closed
  bool committed_ = false;
};

}  // namespace pilotis
