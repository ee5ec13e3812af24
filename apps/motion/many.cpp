#include "apps/motion/many.hpp"

#include <oneapi/tbb/global_control.h>
#include <oneapi/tbb/parallel_pipeline.h>
#include <oneapi/tbb/task_arena.h>

#include <atomic>

namespace pilotis {

namespace {

FileNumbers numbers_of_file(const std::string& file, const RecordHints& hints, const MotionRequest& request) {
  FileNumbers numbers{file, {}, {}};
  try {
    for (ReadComponent& component : components_of(file, hints))
      numbers.components.push_back(numbers_of(file, std::move(component), request));
  } catch (const Error& error) {
    numbers.components.clear();
    numbers.failure = error;
  }
  return numbers;
}

}  // namespace

void each_file(const std::vector<std::string>& files, const RecordHints& hints, const MotionRequest& request,
               int threads, const std::function<bool(FileNumbers)>& take) {
  namespace tbb = oneapi::tbb;
  const auto count = static_cast<std::size_t>(threads);
  const tbb::global_control limit(tbb::global_control::max_allowed_parallelism, count);
  std::atomic<bool> stop = false;
  std::size_t next = 0;
  const auto draw = [&](tbb::flow_control& control) -> std::size_t {
    if (next < files.size() && !stop) return next++;
    control.stop();
    return 0;
  };
  const auto compute = [&](std::size_t i) { return numbers_of_file(files[i], hints, request); };
  const auto hand_over = [&](FileNumbers numbers) {
    if (!stop && !take(std::move(numbers))) stop = true;
  };
  tbb::task_arena arena(threads);
  arena.execute([&] {
    tbb::parallel_pipeline(2 * count,
                           tbb::make_filter<void, std::size_t>(tbb::filter_mode::serial_in_order, draw) &
                               tbb::make_filter<std::size_t, FileNumbers>(tbb::filter_mode::parallel, compute) &
                               tbb::make_filter<FileNumbers, void>(tbb::filter_mode::serial_in_order, hand_over));
  });
}

}  // namespace pilotis
