// Many record files at once: read and computed by several threads, handed over in the order of the list.
#pragma once

#include <functional>
#include <optional>

#include "apps/motion/numbers.hpp"
#include "core/error.hpp"

namespace pilotis {

// What one file came to: its components, or why it could not be used.
struct FileNumbers {
  std::string file;
  std::vector<RecordNumbers> components;
  std::optional<Error> failure;
};

// Calls `take` once for every file, in their order, by one thread at a time. It returns false to stop: no further file
// is begun. A file that cannot be used does not stop the others. What `take` throws is thrown on. Memory holds two
// files a thread, however many there are.
void each_file(const std::vector<std::string>& files, const RecordHints& hints, const MotionRequest& request,
               int threads, const std::function<bool(FileNumbers)>& take);

}  // namespace pilotis
