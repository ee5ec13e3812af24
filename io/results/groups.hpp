// The groups of the result file, one source each. Writers make the group; readers throw Error (input) naming the file
// and what is missing. Arrays over an empty scale (no motions, no modes, no limits) are left out: the group is there,
// bare. Stories, floors and modes are counted up to the most that any building has; what a building has not is NaN or
// "".
#pragma once

#include <H5Cpp.h>

#include <span>
#include <string>
#include <unordered_map>
#include <vector>

#include "core/response/history_format.hpp"
#include "core/response/results.hpp"
#include "core/verdict/limit.hpp"
#include "io/results/row_array.hpp"
#include "io/results/study_header.hpp"

namespace pilotis {

using Buildings = std::vector<BuildingSummary>;

// A result file open for reading, with its name for messages.
struct ResultFile {
  H5::H5File file;
  std::string where;
};

// The runs of a file: `count` of them, numbered from `first`; all of a study from 0, or those of a shard.
struct RunRange {
  std::size_t first = 0, count = 0;
};

// Attributes of the root. Reading leaves buildings, motions and limits, which have groups of their own, empty.
void write_root(H5::H5File& file, const StudyHeader& header);
StudyHeader read_root(const ResultFile& from);

std::size_t most_stories(const Buildings& buildings);

// Buildings by name, as /runs has them.
class BuildingIndex {
 public:
  BuildingIndex(const Buildings& buildings, std::string where);
  int of(const std::string& name) const;  // throws Error (input) for an unknown one

 private:
  std::unordered_map<std::string, int> index_;
  std::string where_;
};

// /building [building], [building, story], [building, floor], [building, mode], ...
void write_buildings(H5::H5File& file, const Buildings& buildings);
Buildings read_buildings(const ResultFile& from);  // without the matrices

// /motions [motion]
void write_motions(H5::H5File& file, const std::vector<MotionSummary>& motions);
std::vector<MotionSummary> read_motions(const ResultFile& from);

// /runs [run]: all of RunResult that is one value per run. `first` is the row of results[0] in the file.
RowArrays make_runs(H5::H5File& file, RunRange runs);
void write_runs(RowArrays& arrays, std::size_t first, std::span<const RunResult> results, const Buildings& buildings);
const char* number_column(double RunResult::*member);  // the array's name in /runs
RunStatus status_from(const std::string& name, const std::string& where);
void read_runs(const ResultFile& from, RunRange all, std::size_t first, const Buildings& buildings,
               std::span<RunResult> results);

// /peaks [run, story|floor] or [run]: q, q_time, q_step_error for every listed quantity
RowArrays make_peaks(H5::H5File& file, RunRange runs, std::size_t stories);
void write_peaks(RowArrays& arrays, std::size_t first, std::span<const RunResult> results, const Buildings& buildings);
// Results whose building is known.
void read_peaks(const ResultFile& from, RunRange all, std::size_t first, const Buildings& buildings,
                std::span<RunResult> results);

// /residual [run, story]: drift, drift_swing, drift_step_error, drift_ratio, drift_ratio_step_error; NaN where a run
// did not last
RowArrays make_residuals(H5::H5File& file, RunRange runs, std::size_t stories);
void write_residuals(RowArrays& arrays, std::size_t first, std::span<const RunResult> results,
                     const Buildings& buildings);
void read_residuals(const ResultFile& from, RunRange all, std::size_t first, const Buildings& buildings,
                    std::span<RunResult> results);

// /histories/<run> [time, story|floor] or [time], for the runs that kept some
void make_histories(H5::H5File& file);
void write_histories(H5::H5File& file, std::size_t first, std::span<const RunResult> results,
                     const Buildings& buildings, HistoryFormat format);
// Those of the runs of another file, as they are stored there.
void copy_histories(H5::H5File& file, const ResultFile& from, RunRange runs);
bool has_history(const ResultFile& from, std::size_t run);
// Fills times and histories; leaves them empty when the run kept none.
void read_history(const ResultFile& from, std::size_t run, RunResult& into);

// /verdict [limit]: the limits as given; [outcome]: each limit for each building at each factor
void write_verdict(H5::H5File& file, const std::vector<Limit>& limits, const Buildings& buildings,
                   const Verdict& verdict);
std::vector<Limit> read_limits(const ResultFile& from);

}  // namespace pilotis
