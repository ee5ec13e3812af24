// The result file (HDF5). See DEVELOPERS.md for its layout; every array has dimension scales, units and a long name.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "core/response/results.hpp"
#include "core/verdict/limit.hpp"
#include "io/results/study_header.hpp"
#include "io/study/study.hpp"

namespace pilotis {

// What a result file holds, as far as judging and showing need it.
struct StoredStudy {
  std::string title, study_text, study_file, program_version, created;
  StudyUnits units;      // those of the study, for showing
  StudyResults results;  // histories left empty
  std::vector<Limit> limits;
};

// Writes to a temporary file beside `file`, syncs, renames: `file` is whole or untouched. Throws Error (outside).
void write_results(const std::filesystem::path& file, const StoredStudy& stored, const Verdict& verdict);

// Throws Error naming the file and what is missing when it is not a result file of this program.
StoredStudy read_results(const std::filesystem::path& file);

// The histories of one run (times and histories of RunResult are filled). `run` counts from 0.
RunResult read_run(const std::filesystem::path& file, int run);

}  // namespace pilotis
