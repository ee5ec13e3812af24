// What `check` tells of a study, a building file or a record, for the screen and for scripts.
#pragma once

#include <nlohmann/json.hpp>
#include <string>

#include "io/records/record.hpp"
#include "io/study/study.hpp"

namespace pilotis {

// Text for the screen, numbers in the study's units.
std::string study_text(const Study& study);
std::string building_file_text(const StudyBuilding& building);
std::string record_text(const std::string& file, const FileOfRecords& records);

// The same as data; every number in SI, with the unit at the end of its key where it has one ("height_m").
nlohmann::ordered_json study_json(const Study& study);
nlohmann::ordered_json building_file_json(const StudyBuilding& building);
nlohmann::ordered_json record_json(const std::string& file, const FileOfRecords& records);

struct BuildingFacts {
  double height = 0, weight = 0;      // m, N
  std::vector<double> first_periods;  // s, at most three
};
// Throws Error (input) when the building has no modes to tell of: it buckles under its own weight.
BuildingFacts facts_of(const StudyBuilding& building);
std::string building_text(const StudyBuilding& building, const StudyUnits& units);  // story by story
std::string buildings_text(const Study& study);

// "Rayleigh, 5% in modes 1 and 3 ..."
std::string damping_text(const Damping& damping);
// "mean", "84th percentile", ...
std::string statistic_text(const Limit& limit);

}  // namespace pilotis
