#include "io/study/motion_store.hpp"

#include <fmt/format.h>

#include <deque>
#include <mutex>

#include "core/error.hpp"
#include "core/motion/processing/rotate.hpp"
#include "io/digest.hpp"

namespace pilotis {

namespace {

using Samples = std::shared_ptr<const Accelerogram>;

std::size_t bytes_of(const Accelerogram& record) { return record.samples.size() * sizeof(double); }

Error no_longer(const Motion& motion, const std::string& what) {
  return outside_error(motion.file, fmt::format("the record of motion \"{}\" {}", motion.name, what),
                       "leave the records as they are while a study runs; then start again");
}

// The record of a motion that was read before.
Accelerogram read_again(const MotionSource& source, const Motion& motion) {
  MotionRead read;
  try {
    read = read_motion(source);
  } catch (const Error& error) {
    throw no_longer(motion, fmt::format("was read before and cannot be read again: {}", error.problem()));
  }
  if (read.motion.digest != motion.digest)
    throw no_longer(motion, fmt::format("has changed since the study was read: its SHA-256 digest was {} and is {}",
                                        motion.digest, read.motion.digest));
  return std::move(read.record);
}

}  // namespace

namespace {

// One component, processed; `done` and the notes are added to `read`.
RecordFile processed_component(const std::filesystem::path& path, const RecordHints& hints,
                               const std::vector<ProcessStep>& steps, MotionRead& read) {
  RecordFile file = read_record(path, hints);
  for (const std::string& note : file.notes) read.notes.push_back(fmt::format("{}: {}", path.string(), note));
  ProcessedRecord processed = process_all(steps, file.record);
  file.record = std::move(processed.record);
  const std::string of = hints.component ? *hints.component + ": " : "";
  for (const std::string& line : processed.done) read.motion.processing.push_back(of + line);
  return file;
}

}  // namespace

MotionRead read_motion(const MotionSource& source) {
  MotionRead read;
  RecordFile file = processed_component(source.file, source.hints, source.process, read);
  if (source.pair) {
    const RecordFile second = processed_component(source.pair->file, source.pair->hints, source.process, read);
    RotatedPair turned = rotated(file.record, second.record, source.pair->angle, source.file.string());
    file.record = std::move(turned.first);
    read.motion.processing.push_back(turned.done);
  }
  for (double& sample : file.record.samples) sample *= source.factor;
  read.motion = {source.name,
                 source.file.string(),
                 file.format,
                 file.unit,
                 digest_of(file.record),
                 source.factor,
                 file.record.step,
                 file.record.first_sample_at,
                 static_cast<long>(file.record.samples.size()),
                 peak_of(file.record),
                 std::move(read.motion.processing)};
  read.record = std::move(file.record);
  read.record.samples.shrink_to_fit();
  return read;
}

struct MotionStore::Shelf {
  // These do not change once the store is made.
  std::vector<MotionSource> sources;
  std::vector<Motion> motions;
  std::vector<std::string> notes;
  std::vector<Samples> kept;     // empty from the first that found no room
  std::size_t recent_bytes = 0;  // at most, in `recent`

  std::mutex mutex;  // guards what follows
  std::vector<std::weak_ptr<const Accelerogram>> lent;
  std::deque<Samples> recent;  // the latest at the back
  std::size_t recent_held = 0;

  void keep(std::size_t i, const Samples& samples);
};

void MotionStore::Shelf::keep(std::size_t i, const Samples& samples) {
  const std::lock_guard lock(mutex);
  lent[i] = samples;
  recent.push_back(samples);
  recent_held += bytes_of(*samples);
  while (recent_held > recent_bytes) {
    recent_held -= bytes_of(*recent.front());
    recent.pop_front();
  }
}

MotionStore::MotionStore() : MotionStore(std::vector<MotionSource>{}) {}

MotionStore::MotionStore(std::vector<MotionSource> sources, std::size_t keep_bytes)
    : shelf_(std::make_shared<Shelf>()) {
  Shelf& shelf = *shelf_;
  shelf.sources = std::move(sources);
  shelf.recent_bytes = keep_bytes / 8;
  shelf.lent.resize(shelf.sources.size());
  std::size_t kept_bytes = 0;
  for (const MotionSource& source : shelf.sources) {
    MotionRead read = read_motion(source);
    shelf.motions.push_back(std::move(read.motion));
    shelf.notes.insert(shelf.notes.end(), read.notes.begin(), read.notes.end());
    kept_bytes += bytes_of(read.record);
    if (kept_bytes <= keep_bytes) shelf.kept.push_back(std::make_shared<const Accelerogram>(std::move(read.record)));
  }
  shelf.kept.resize(shelf.sources.size());
}

const std::vector<Motion>& MotionStore::motions() const { return shelf_->motions; }
const std::vector<std::string>& MotionStore::notes() const { return shelf_->notes; }

Samples MotionStore::samples(std::size_t i) const {
  Shelf& shelf = *shelf_;
  if (const Samples& kept = shelf.kept.at(i)) return kept;
  {
    const std::lock_guard lock(shelf.mutex);
    if (Samples held = shelf.lent[i].lock()) return held;
  }
  // Unlocked: reading takes long, and two threads that read the same record at once get the same samples.
  const auto samples = std::make_shared<const Accelerogram>(read_again(shelf.sources[i], shelf.motions[i]));
  shelf.keep(i, samples);
  return samples;
}

}  // namespace pilotis
