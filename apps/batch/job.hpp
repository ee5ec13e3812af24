// The processes that share a batch: one alone, or the ranks of a cluster job. Shards are drawn from one shared counter,
// so that no process idles while shards remain.
#pragma once

#include <atomic>
#include <memory>
#include <optional>
#include <vector>

namespace pilotis {

class Job {
 public:
  virtual ~Job() = default;
  virtual int rank() const = 0;
  virtual int ranks() const = 0;

  // The next number of 0, 1, 2, ...; every number is drawn once in the whole job. Any thread.
  virtual long draw() = 0;

  // The first process's word, told to all; every process must call it. Main thread.
  virtual void share(std::vector<char>& flags) = 0;
  // True on all when every process says true. Main thread; every process must call it.
  virtual bool all_agree(bool mine) = 0;

  // Adds to the counts of the whole job. Main thread.
  virtual void add_done(long runs, long failures) = 0;
  virtual long runs_done() const = 0;
  virtual long failures() const = 0;

  // Tells the others that this process has come to its end, and whether all that it drew is kept. Nothing while others
  // are still at work; then the same on all: whether every process said true. Main thread; asked again and again.
  virtual std::optional<bool> finished(bool whole) = 0;
  // Lets messages of other processes through while this one waits or works. Main thread, many times a second.
  virtual void breathe() {}

  // Ends every process of the job with this exit status: after an error that the others need not wait for. Does not
  // return in a job of several.
  virtual void give_up(int /*status*/) {}
};

// One process alone.
std::unique_ptr<Job> make_single_job();

// The job this process was started in: the ranks of `mpirun` or a scheduler, or one process alone. Throws Error
// (outside) when it was started as one of several ranks and this build has no MPI.
std::unique_ptr<Job> make_job();

}  // namespace pilotis
