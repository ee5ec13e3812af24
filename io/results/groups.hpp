// The groups of the result file, one source each. Writers make the group; readers throw Error (input) naming the file
// and what is missing. Arrays over an empty scale (no motions, no modes, no limits) are left out: the group is there,
// bare.
#pragma once

#include <H5Cpp.h>

#include <string>
#include <vector>

#include "core/response/results.hpp"
#include "core/verdict/limit.hpp"

namespace pilotis {

// A result file open for reading, with its name for messages.
struct ResultFile {
  H5::H5File file;
  std::string where;
};

// /building [story], [floor], [mode], [mode, floor], [floor, moved_floor]
void write_building(H5::H5File& file, const BuildingSummary& building);
BuildingSummary read_building(const ResultFile& from);

// /motions [motion]
void write_motions(H5::H5File& file, const std::vector<MotionSummary>& motions);
std::vector<MotionSummary> read_motions(const ResultFile& from);

// /runs [run]: all of RunResult that is one value per run
void write_runs(H5::H5File& file, const std::vector<RunResult>& runs);
std::vector<RunResult> read_runs(const ResultFile& from);

// /peaks [run, story|floor] or [run]: q, q_time, q_step_error for every listed quantity
void write_peaks(H5::H5File& file, const StudyResults& results);
void read_peaks(const ResultFile& from, StudyResults& results);

// /residual [run, story]: drift, drift_swing, drift_step_error, drift_ratio; NaN where a run did not last
void write_residuals(H5::H5File& file, const StudyResults& results);
void read_residuals(const ResultFile& from, StudyResults& results);

// /histories/<run> [time, story|floor] or [time], for the runs that kept some
void write_histories(H5::H5File& file, const StudyResults& results);
// Fills times and histories; leaves them empty when the run kept none.
void read_history(const ResultFile& from, int run, int stories, RunResult& into);

// /verdict [limit]: the limits as given; [outcome]: each limit at each factor
void write_verdict(H5::H5File& file, const std::vector<Limit>& limits, const Verdict& verdict);
std::vector<Limit> read_limits(const ResultFile& from);

}  // namespace pilotis
