// What `check` tells of a study or a record, for the screen and for scripts.
#pragma once

#include <nlohmann/json.hpp>
#include <string>

#include "io/records/record.hpp"
#include "io/study/study.hpp"

namespace pilotis {

// Text for the screen, numbers in the study's units.
std::string study_text(const Study& study);
std::string record_text(const std::string& file, const FileOfRecords& records);

// The same as data; every number in SI, with the unit at the end of its key where it has one ("height_m").
nlohmann::ordered_json study_json(const Study& study);
nlohmann::ordered_json record_json(const std::string& file, const FileOfRecords& records);

// "Rayleigh, 5% in modes 1 and 3 ..."
std::string damping_text(const Damping& damping);
// "mean", "84th percentile", ...
std::string statistic_text(const Limit& limit);

}  // namespace pilotis
