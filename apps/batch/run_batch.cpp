#include "apps/batch/run_batch.hpp"

#include <fmt/chrono.h>
#include <fmt/format.h>
#include <fmt/ranges.h>
#include <unistd.h>

#include <ctime>
#include <memory>
#include <optional>
#include <thread>

#include "apps/batch/interrupt.hpp"
#include "apps/batch/march_shards.hpp"
#include "apps/batch/shard_log.hpp"
#include "apps/progress.hpp"
#include "core/error.hpp"
#include "io/results/result_writer.hpp"
#include "io/results/shard_folder.hpp"
#include "io/study/study_digest.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

namespace {

MotionSummary summary_of(const Motion& motion) {
  return {motion.name,
          motion.file,
          motion.digest,
          motion.step,
          motion.samples,
          motion.peak.value,
          fmt::format("{}", fmt::join(motion.processing, "; "))};
}

// The study and the files of its buildings: all that was asked.
std::string whole_text(const Study& study) {
  std::string text = study.text;
  for (const StudyBuilding& building : study.buildings)
    if (!building.text.empty())
      text += fmt::format("\n# ---- building \"{}\": {}\n{}", building.name, building.file.string(), building.text);
  return text;
}

StudyHeader header_of(const BatchPlan& plan) {
  const Study& study = plan.study();
  const auto now = fmt::format("{:%Y-%m-%dT%H:%M:%SZ}", fmt::gmtime(std::time(nullptr)));
  StudyHeader header{study.title, whole_text(study), study.file.string(), PILOTIS_VERSION,
                     now,         study.units,       study.limits,        plan.summaries(),
                     {}};
  for (const Motion& motion : study.motions) header.motions.push_back(summary_of(motion));
  return header;
}

class Batch {
 public:
  Batch(const BatchPlan& plan, const BatchOptions& options, Job& job)
      : plan_(plan), options_(options), job_(job), summaries_(plan.summaries()), log_(options.log) {}

  BatchEnd run() {
    const std::vector<std::size_t> missing = open_shards();
    const InterruptWatch watch;
    Progress progress(isatty(STDERR_FILENO) != 0, options_.quiet || job_.rank() != 0, runs_found_);
    const ShardCalls calls{[&](MarchedShard shard) { keep(std::move(shard)); },
                           [&](double runs) { return tick(progress, runs); }};
    const bool kept = march_shards(plan_, missing, options_.threads, job_, calls);
    const bool whole = wait_for_others(progress, kept);
    progress.finish();
    if (!whole) return stopped();
    if (job_.rank() == 0) put_together();
    BatchEnd end;
    end.whole = true;
    end.shards_found = shards_found_;
    return end;
  }

 private:
  bool saves() const { return plan_.saves_shards() || job_.ranks() > 1; }

  // Opens the folder of the shards, where there is one, and gives the shards that are missing in it.
  std::vector<std::size_t> open_shards() {
    std::vector<char> whole(plan_.shards().size(), 0);
    if (saves()) whole = whole_shards();
    std::vector<std::size_t> missing;
    for (std::size_t i = 0; i < whole.size(); ++i) {
      if (whole[i] == 0) {
        missing.push_back(i);
      } else {
        ++shards_found_;
        runs_found_ += static_cast<long>(plan_.shards()[i].count);
      }
    }
    if (!saves()) unsaved_.resize(plan_.shards().size());
    return missing;
  }

  // The first process makes the folder and looks through it; the others wait for its word.
  std::vector<char> whole_shards() {
    std::vector<char> whole(plan_.shards().size(), 0);
    std::exception_ptr error;
    if (job_.rank() == 0) {
      try {
        open_folder(FolderLock::take);
        for (std::size_t i = 0; i < whole.size(); ++i) whole[i] = is_whole(i);
      } catch (...) {
        error = std::current_exception();
      }
    }
    if (!job_.all_agree(error == nullptr)) {
      if (error) std::rethrow_exception(error);
      throw outside_error(options_.output.string(), "the first process of the job could not begin", "see its message");
    }
    job_.share(whole);
    if (job_.rank() != 0) open_folder(FolderLock::held_by_the_job);
    return whole;
  }

  void open_folder(FolderLock lock) {
    const ShardKey key{study_digest(plan_.study(), PILOTIS_VERSION), PILOTIS_VERSION, plan_.runs(),
                       plan_.shards().size()};
    folder_.emplace(options_.output, key, summaries_, plan_.study().keep.format, lock);
  }

  bool is_whole(std::size_t shard) {
    std::string note;
    const bool whole = folder_->is_whole(shard, &note);
    if (!note.empty()) fmt::print(stderr, "note: {}; it is marched again\n", note);
    return whole;
  }

  void keep(MarchedShard shard) {
    const Shard& cut = plan_.shards()[shard.shard];
    const long failures = failures_in(shard.results);
    if (folder_) folder_->write(shard.shard, cut.first, shard.results);
    log_.add(shard, cut, job_.rank());
    job_.add_done(static_cast<long>(cut.count), failures);
    if (!folder_) unsaved_[shard.shard] = std::move(shard.results);
  }

  // Of a job of several ranks only whole shards are known; alone, the runs in hand count as well.
  bool tick(Progress& progress, double runs_here) {
    const double runs = job_.ranks() > 1 ? static_cast<double>(job_.runs_done()) : runs_here;
    progress.show(static_cast<double>(runs_found_) + runs, static_cast<long>(plan_.runs()), job_.failures());
    return InterruptWatch::asked();
  }

  // True when every process of the job has kept all that it drew.
  bool wait_for_others(Progress& progress, bool kept) {
    for (;;) {
      if (const std::optional<bool> all_kept = job_.finished(kept)) return *all_kept;
      tick(progress, 0);
      std::this_thread::sleep_for(std::chrono::milliseconds(20));
    }
  }

  BatchEnd stopped() const {
    BatchEnd end;
    if (!folder_) return end;
    end.goes_on = true;
    end.folder = folder_->path();
    std::error_code ignored;
    for (std::size_t i = 0; i < plan_.shards().size(); ++i)
      if (std::filesystem::exists(folder_->file(i), ignored)) {
        ++end.shards_kept;
        end.runs_kept += plan_.shards()[i].count;
      }
    return end;
  }

  // In the order of the runs, so that equal results give equal bytes.
  void put_together() {
    ResultWriter writer(options_.output, header_of(plan_), plan_.runs(), plan_.study().keep.format,
                        plan_.history_bytes());
    for (std::size_t i = 0; i < plan_.shards().size(); ++i) {
      if (folder_)
        writer.add_shard(*folder_, i);
      else
        writer.add(plan_.shards()[i].first, unsaved_[i]);
    }
    writer.finish();
    if (folder_) folder_->remove();
  }

  const BatchPlan& plan_;
  const BatchOptions& options_;
  Job& job_;
  std::vector<BuildingSummary> summaries_;
  ShardLog log_;
  std::optional<ShardFolder> folder_;            // of the shards, when they are saved
  std::vector<std::vector<RunResult>> unsaved_;  // [shard], when they are not
  std::size_t shards_found_ = 0;
  long runs_found_ = 0;
};

}  // namespace

BatchEnd run_batch(const BatchPlan& plan, const BatchOptions& options, Job& job) {
  if (job.rank() == 0) const WholeFile writable(options.output);  // better known before the march than after it
  return Batch(plan, options, job).run();
}

std::size_t shards_beside(const std::filesystem::path& output) {
  std::error_code ignored;
  std::size_t count = 0;
  for (std::filesystem::directory_iterator file(ShardFolder::beside(output), ignored), end; file != end;
       file.increment(ignored))
    count += file->path().extension() == ".h5";
  return count;
}

}  // namespace pilotis
