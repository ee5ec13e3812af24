// A job of MPI ranks. The counters stand in a window of the first rank and are read and raised one-sidedly (MPI-3.1,
// chapter 11): drawing a shard asks nothing of the first rank's program.
#include "apps/batch/mpi_job.hpp"

#include <mpi.h>

#include <algorithm>
#include <mutex>

namespace pilotis {

namespace {

enum Counter : MPI_Aint { drawn, runs, failed, counters };

class MpiJob : public Job {
 public:
  MpiJob() {
    int provided = 0;
    MPI_Init_thread(nullptr, nullptr, MPI_THREAD_SERIALIZED, &provided);
    if (provided < MPI_THREAD_SERIALIZED) MPI_Abort(MPI_COMM_WORLD, 4);
    MPI_Comm_rank(MPI_COMM_WORLD, &rank_);
    MPI_Comm_size(MPI_COMM_WORLD, &ranks_);
    const MPI_Aint size = rank_ == 0 ? counters * static_cast<MPI_Aint>(sizeof(long)) : 0;
    MPI_Win_allocate(size, sizeof(long), MPI_INFO_NULL, MPI_COMM_WORLD, &memory_, &window_);
    if (rank_ == 0) std::fill(memory_, memory_ + counters, 0L);
    MPI_Barrier(MPI_COMM_WORLD);
    MPI_Win_lock_all(0, window_);
  }

  ~MpiJob() override {
    MPI_Win_unlock_all(window_);
    MPI_Win_free(&window_);
    MPI_Finalize();
  }

  int rank() const override { return rank_; }
  int ranks() const override { return ranks_; }
  long draw() override { return raise(drawn, 1); }

  void share(std::vector<char>& flags) override {
    const std::lock_guard lock(mutex_);
    MPI_Bcast(flags.data(), static_cast<int>(flags.size()), MPI_CHAR, 0, MPI_COMM_WORLD);
  }

  bool all_agree(bool mine) override {
    const std::lock_guard lock(mutex_);
    int one = mine, all = 0;
    MPI_Allreduce(&one, &all, 1, MPI_INT, MPI_MIN, MPI_COMM_WORLD);
    return all != 0;
  }

  void add_done(long count, long failures) override {
    raise(runs, count);
    if (failures > 0) raise(failed, failures);
  }
  long runs_done() const override { return read(runs); }
  long failures() const override { return read(failed); }

  std::optional<bool> finished(bool whole) override {
    const std::lock_guard lock(mutex_);
    if (asked_ == MPI_REQUEST_NULL && !answered_) {
      mine_ = whole;
      MPI_Iallreduce(&mine_, &all_, 1, MPI_INT, MPI_MIN, MPI_COMM_WORLD, &asked_);
    }
    int done = 0;
    MPI_Test(&asked_, &done, MPI_STATUS_IGNORE);
    if (done == 0) return std::nullopt;
    answered_ = true;
    return all_ != 0;
  }

  // One-sided calls of others may need this process's hand where the network does not do them by itself.
  void breathe() override {
    const std::lock_guard lock(mutex_);
    int flag = 0;
    MPI_Iprobe(MPI_ANY_SOURCE, MPI_ANY_TAG, MPI_COMM_WORLD, &flag, MPI_STATUS_IGNORE);
  }

  void give_up(int status) override { MPI_Abort(MPI_COMM_WORLD, status); }

 private:
  long raise(Counter counter, long by) {
    const std::lock_guard lock(mutex_);
    long before = 0;
    MPI_Fetch_and_op(&by, &before, MPI_LONG, 0, counter, MPI_SUM, window_);
    MPI_Win_flush(0, window_);
    return before;
  }

  long read(Counter counter) const {
    const std::lock_guard lock(mutex_);
    long value = 0;
    MPI_Fetch_and_op(nullptr, &value, MPI_LONG, 0, counter, MPI_NO_OP, window_);
    MPI_Win_flush(0, window_);
    return value;
  }

  int rank_ = 0, ranks_ = 1;
  long* memory_ = nullptr;
  MPI_Win window_ = MPI_WIN_NULL;
  MPI_Request asked_ = MPI_REQUEST_NULL;
  bool answered_ = false;
  int mine_ = 0, all_ = 0;
  mutable std::mutex mutex_;  // MPI takes one thread at a time here
};

}  // namespace

extern "C" Job* pilotis_make_mpi_job() { return new MpiJob; }

}  // namespace pilotis
