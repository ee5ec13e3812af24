#include "apps/batch/march_shards.hpp"

#include <oneapi/tbb/global_control.h>
#include <oneapi/tbb/task_arena.h>

#include <chrono>
#include <condition_variable>
#include <deque>
#include <exception>
#include <mutex>
#include <optional>

#include "apps/batch/march_shard.hpp"

namespace pilotis {

namespace {

constexpr auto tick_time = std::chrono::milliseconds(50);

// Shards on their way from the threads that march to the one that keeps. Holds a few, so that memory stays flat however
// slow the disk is.
class Belt {
 public:
  explicit Belt(std::size_t room) : room_(room) {}

  void put(MarchedShard shard) {
    std::unique_lock lock(mutex_);
    changed_.wait(lock, [&] { return shards_.size() < room_; });
    shards_.push_back(std::move(shard));
    changed_.notify_all();
  }

  // Nothing when none has come within `patience`, or when the last worker has left.
  std::optional<MarchedShard> take(std::chrono::milliseconds patience) {
    std::unique_lock lock(mutex_);
    changed_.wait_for(lock, patience, [&] { return !shards_.empty() || workers_ == 0; });
    if (shards_.empty()) return std::nullopt;
    MarchedShard shard = std::move(shards_.front());
    shards_.pop_front();
    changed_.notify_all();
    return shard;
  }

  void workers_come(int count) {
    const std::lock_guard lock(mutex_);
    workers_ += count;
  }
  void worker_leaves() {
    const std::lock_guard lock(mutex_);
    --workers_;
    changed_.notify_all();
  }
  bool is_over() {
    const std::lock_guard lock(mutex_);
    return workers_ == 0 && shards_.empty();
  }

 private:
  std::size_t room_;
  std::mutex mutex_;
  std::condition_variable changed_;
  std::deque<MarchedShard> shards_;
  int workers_ = 0;
};

class Crew {
 public:
  Crew(const BatchPlan& plan, const std::vector<std::size_t>& missing, Job& job, int threads)
      : plan_(plan), missing_(missing), job_(job), belt_(static_cast<std::size_t>(threads)) {}

  // What one thread does.
  void work() noexcept {
    try {
      while (!draw_no_more_ && !watch_.stop)
        if (!march_next()) break;
    } catch (...) {
      fail(std::current_exception());
    }
    belt_.worker_leaves();
  }

  // The calling thread's part: until every worker has left and the belt is empty.
  void keep_all(const ShardCalls& calls) noexcept {
    const double per_run = marches_per_run(plan_.building(0).settings);
    while (!belt_.is_over()) {
      try {
        if (auto shard = belt_.take(tick_time); shard && !keeping_failed_) calls.keep(std::move(*shard));
      } catch (...) {
        keeping_failed_ = true;
        fail(std::current_exception());
      }
      job_.breathe();
      if (calls.tick(static_cast<double>(watch_.marches_ended) / per_run)) watch_.stop = true;
    }
  }

  Belt& belt() { return belt_; }
  bool stopped() const { return watch_.stop; }
  void rethrow() const {
    if (error_) std::rethrow_exception(error_);
  }

 private:
  // False when nothing is left, or when the march was stopped.
  bool march_next() {
    const auto drawn = static_cast<std::size_t>(job_.draw());
    if (drawn >= missing_.size()) return false;
    const auto begin = std::chrono::steady_clock::now();
    auto results = march_shard(plan_, plan_.shards()[missing_[drawn]], watch_);
    if (!results) return false;
    const double seconds = std::chrono::duration<double>(std::chrono::steady_clock::now() - begin).count();
    belt_.put({missing_[drawn], std::move(*results), seconds});
    return true;
  }

  // The first failure is told; the other threads end the shards they have in hand.
  void fail(std::exception_ptr error) noexcept {
    const std::lock_guard lock(mutex_);
    if (!error_) error_ = error;
    draw_no_more_ = true;
  }

  const BatchPlan& plan_;
  const std::vector<std::size_t>& missing_;
  Job& job_;
  Belt belt_;
  BatchWatch watch_;
  std::atomic<bool> draw_no_more_ = false;
  bool keeping_failed_ = false;  // what the belt still brings is let go
  std::mutex mutex_;
  std::exception_ptr error_;
};

}  // namespace

bool march_shards(const BatchPlan& plan, const std::vector<std::size_t>& missing, int threads, Job& job,
                  const ShardCalls& calls) {
  namespace tbb = oneapi::tbb;
  const tbb::global_control limit(tbb::global_control::max_allowed_parallelism, static_cast<std::size_t>(threads) + 1);
  tbb::task_arena arena(threads, 0);  // no place kept for the calling thread: it keeps, they march
  Crew crew(plan, missing, job, threads);
  crew.belt().workers_come(threads);
  for (int i = 0; i < threads; ++i) arena.enqueue([&] { crew.work(); });  // each by a thread of its own
  crew.keep_all(calls);                                                   // until all of them have left
  crew.rethrow();
  return !crew.stopped();
}

}  // namespace pilotis
