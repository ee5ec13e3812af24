// The study file in memory. read_study() makes it from TOML; every number is SI by then.
#pragma once

#include <filesystem>
#include <map>
#include <optional>
#include <span>
#include <string>
#include <vector>

#include "core/building/stick.hpp"
#include "core/motion/floor_force.hpp"
#include "core/parameter.hpp"
#include "core/response/history_format.hpp"
#include "core/verdict/limit.hpp"
#include "io/study/motion_store.hpp"

namespace pilotis {

// The units a study writes bare numbers in and screens show. Time is always seconds.
struct StudyUnits {
  std::string force = "N", length = "m";
  std::string mass;  // empty: the consistent one, force s2/length
  // SI factor of a bare number / of a shown number, and its name, e.g. "kN/m".
  double factor(Dimension dimension) const;
  std::string name(Dimension dimension) const;
};

// A scheme by name with its parameters (SI) in the order of the catalogue's Method::parameters, defaults filled in.
struct SchemeChoice {
  std::string name;
  std::vector<double> values;
};

struct MarchSettings {
  SchemeChoice scheme;
  std::optional<double> step;      // s; empty: "auto"
  double tail = 10;                // s of free vibration after each motion
  std::optional<double> duration;  // s; required without motions and floor forces
  bool error_check = true;
  double collapse_drift_ratio = 0.10;  // a run stops when a story passes it
  double tolerance = 1e-9;             // Newton: largest out-of-balance force / largest load of the run
  int halvings = 10;                   // of a step that does not converge, before the run is given up
};

struct KeepSettings {
  std::vector<const Quantity*> histories;
  int every = 1;  // keep every n-th step
  HistoryFormat format;
};

// A building of the study, in a file of its own or in the study itself.
struct StudyBuilding {
  std::string name;            // unique in the study; of a study's own building its title, or "building"
  std::filesystem::path file;  // as found; empty when the building stands in the study itself
  std::string text;            // the file as read; empty likewise
  std::string title;           // as its file gives it, or else its name
  StudyUnits units;            // of bare numbers in its file
  Stick stick;
};

struct Study {
  std::filesystem::path file;
  std::string text;  // the file as read; with the texts of the buildings it is the whole of what was asked
  std::string title;
  StudyUnits units;
  std::vector<StudyBuilding> buildings;  // at least one, in the order of the study
  MotionStore motions;                   // in the order of the study, the study's own factors applied
  std::vector<double> factors;           // at least one; {1} by default
  std::vector<FloorForce> forces;
  std::vector<double> initial_displacement, initial_velocity;  // m, m/s, [floor]; empty: at rest
  MarchSettings march;
  KeepSettings keep;
  std::vector<Limit> limits;
  std::vector<std::string> notes;  // what the reader assumed and the user should know, one line each
};

// Throws Error with file, line, key, what was found and what is allowed (with the nearest known key).
// `schemes` is the catalogue a study may choose from. Motion and building files are relative to the study file.
Study read_study(const std::filesystem::path& file, std::span<const Method> schemes);

}  // namespace pilotis
