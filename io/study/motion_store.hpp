// The motions of a suite with flat memory: thousands of records may be many times what memory holds.
#pragma once

#include <cstddef>
#include <filesystem>
#include <memory>
#include <optional>
#include <span>
#include <string>
#include <vector>

#include "core/motion/accelerogram.hpp"
#include "core/motion/processing/registry.hpp"
#include "io/records/record.hpp"

namespace pilotis {

// The second of two horizontal components that are turned into one (core/motion/processing/rotate.hpp). Both are
// processed alike before they are turned.
struct PairedComponent {
  std::filesystem::path file;
  RecordHints hints;
  double angle = 0;  // rad, from the first component towards the second
};

// A motion as the study asks for it.
struct MotionSource {
  std::filesystem::path file;
  std::string name;   // unique in the suite
  double factor = 1;  // of this motion alone, not 0
  RecordHints hints;
  std::vector<ProcessStep> process = {};     // done to the record before the factor is applied, in order
  std::optional<PairedComponent> pair = {};  // the other horizontal component, where two make the motion
};

// A motion as read, its factor applied to the samples.
struct MotionRead {
  Motion motion;
  Accelerogram record;
  std::vector<std::string> notes;  // what the record reader assumed, one line each, with the file's name
};

// Depends on the source and its file only, so many may be read at once. Throws Error as read_record() does.
MotionRead read_motion(const MotionSource& source);

// Every record is read once when the store is made. Samples are kept while all of them together stay within
// `keep_bytes`; of the others those read last are kept within an eighth of that, and the rest is read again when asked
// for. Copies share one store. All const members may be called by any number of threads at once.
class MotionStore {
 public:
  static constexpr std::size_t default_keep_bytes = std::size_t{256} << 20;

  MotionStore();  // no motion
  // Throws Error as read_record() does.
  explicit MotionStore(std::vector<MotionSource> sources, std::size_t keep_bytes = default_keep_bytes);

  bool empty() const { return motions().empty(); }
  std::size_t size() const { return motions().size(); }
  const Motion& operator[](std::size_t i) const { return motions()[i]; }
  std::vector<Motion>::const_iterator begin() const { return motions().begin(); }
  std::vector<Motion>::const_iterator end() const { return motions().end(); }
  const std::vector<std::string>& notes() const;  // of all records, in their order

  // The samples of motion i (m/s2, its factor applied), to be held as long as they are needed. Throws Error (outside)
  // when the file has to be read again and is gone or is not what it was when the store was made.
  std::shared_ptr<const Accelerogram> samples(std::size_t i) const;

 private:
  struct Shelf;
  const std::vector<Motion>& motions() const;

  std::shared_ptr<Shelf> shelf_;
};

}  // namespace pilotis
