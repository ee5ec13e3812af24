// What the runs of a study gave, in memory: made by the engine, written by io/results, judged by core/verdict.
#pragma once

#include <string>
#include <vector>

#include "core/response/quantities.hpp"

namespace pilotis {

enum class RunStatus : unsigned char { done, collapsed, not_converged };
std::string_view status_name(RunStatus status);  // "done", "collapsed", "not converged"

// The extreme of largest magnitude over the run.
struct Peak {
  double value = 0;       // SI, with its sign
  double time = 0;        // s
  double step_error = 0;  // SI, estimated error from the time step, >= 0; NaN when not estimated
};

// The instant values kept of one quantity.
struct History {
  const Quantity* quantity = nullptr;
  std::vector<double> values;  // SI, [time][story|floor], row-major
};

// Runs are counted from 0: ((building * factors + factor) * motions + motion). A study without motions has one, "none".
struct RunResult {
  int building = 0;         // which of the study's, counted from 0
  std::string motion;       // name; "none" without ground motion
  double factor = 1;        // on the ground motion
  std::string scheme;       // name with its parameters
  double step = 0;          // s; for adaptive schemes the interval between kept states
  std::string step_choice;  // one line: why this step
  RunStatus status = RunStatus::done;
  std::string status_note;  // e.g. "collapsed at 12.3 s: story 2 passed drift ratio 0.1"; empty when done
  double time_reached = 0;  // s
  double energy_error = 0;  // largest |input - kinetic - damping - absorbed - elastic| / largest input, fraction
  double energy_input = 0, energy_damping = 0, energy_absorbed = 0;  // J, at the end of the run
  double wall_time = 0;                                              // s
  std::vector<Peak> peaks;                                           // flat, ResponseLayout order
  std::vector<double> residual_drift;  // m, [story], signed; mean drift over the last fundamental period of the tail
  std::vector<double> residual_swing;  // m, [story], half the range of the drift over that period: how still it is
  std::vector<double> residual_error;  // m, [story], estimated error from the time step; NaN when not estimated
  std::vector<double> times;           // s, of the histories; empty when none are kept
  std::vector<History> histories;
};

// One mode of vibration of the building.
struct Mode {
  double period = 0;          // s
  double participation = 0;   // Gamma = phi^T M iota / phi^T M phi, with the shape as below
  double effective_mass = 0;  // kg
  double damping_ratio = 0;   // fraction of critical: phi^T C phi / (2 omega phi^T M phi)
  std::vector<double> shape;  // [floor], largest magnitude 1, roof positive
};

struct BuildingSummary {
  std::string name;  // unique in the study
  std::string title;
  std::vector<std::string> labels;  // [story]
  std::vector<double> heights;      // m, [story]
  std::vector<double> masses;       // kg, [floor]
  std::vector<Mode> modes;          // from the longest period
  std::vector<double> mass_matrix, damping_matrix,
      stiffness_matrix;  // [floor][floor], row-major, SI; stiffness: initial, with P-Delta
};

struct MotionSummary {
  std::string name, file, digest;
  double step = 0;  // s
  long samples = 0;
  double peak = 0;              // m/s2, signed, with the motion's own factor
  std::string processing = {};  // what was done to the record before it was used, "; " between the steps
};

struct StudyResults {
  std::vector<BuildingSummary> buildings;
  std::vector<MotionSummary> motions;
  std::vector<RunResult> runs;  // all motions at the first factor, then at the next
};

}  // namespace pilotis
