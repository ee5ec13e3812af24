// What a result file says of its study beside the runs.
#pragma once

#include <string>
#include <vector>

#include "core/response/results.hpp"
#include "core/verdict/limit.hpp"
#include "io/study/study.hpp"

namespace pilotis {

struct StudyHeader {
  std::string title, study_text, study_file, program_version;
  std::string created;  // ISO 8601, UTC; when it is written: empty means now
  StudyUnits units;     // those of the study, for showing
  std::vector<Limit> limits;
  std::vector<BuildingSummary> buildings;  // as read: without their matrices
  std::vector<MotionSummary> motions;
};

}  // namespace pilotis
