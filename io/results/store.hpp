// A result file in one go, for few runs: all of it in memory. io/results/result_writer.hpp and result_table.hpp do it
// for any number.
#pragma once

#include <filesystem>
#include <vector>

#include "core/response/history_format.hpp"
#include "io/results/study_header.hpp"

namespace pilotis {

// What a result file holds, as far as judging and showing need it.
struct StoredStudy : StudyHeader {
  std::vector<RunResult> runs;
};

// `file` is whole or untouched. The verdict is that of the file. Throws Error (outside).
Verdict write_results(const std::filesystem::path& file, const StoredStudy& stored, HistoryFormat histories = {});

// Without histories. Throws Error naming the file and what is missing when it is not a result file of this program.
StoredStudy read_results(const std::filesystem::path& file);

}  // namespace pilotis
