// What the ground does, as samples. Plain data; readers in io/records make it, core/system/load.hpp marches it.
#pragma once

#include <string>
#include <vector>

namespace pilotis {

// One component. Between samples the acceleration is taken linear; after the last sample it falls linearly to zero
// within one step and stays there.
struct Accelerogram {
  double step = 0;              // s, > 0
  double first_sample_at = 0;   // s, time of samples[0]: 0, or one step (then the ground is at rest at t = 0)
  std::vector<double> samples;  // m/s2, at least two, all finite

  // s, time of the last sample.
  double duration() const { return first_sample_at + step * static_cast<double>(samples.size() - 1); }
};

// Throws Error (input) at `where` when a field is not as described above.
void validate(const Accelerogram& record, const std::string& where);

// The sample of largest magnitude with its sign, and its time.
struct PeakSample {
  double value = 0;  // m/s2
  double time = 0;   // s
};
PeakSample peak_of(const Accelerogram& record);

// One event at one station, as a study uses it: all but its samples, which io/study/motion_store.hpp hands out. A stick
// takes one horizontal component.
struct Motion {
  std::string name;            // unique in the suite
  std::string file;            // as found, for messages; empty for a made one
  std::string format;          // what the reader recognised, e.g. "PEER database header"
  std::string unit;            // unit in the file or as the study states it, e.g. "g"
  std::string digest;          // SHA-256 of step, first sample time and samples (little-endian doubles), lower-case hex
  double factor = 1;           // the study's own factor for this motion; it is in the peak and the digest
  double step = 0;             // s
  double first_sample_at = 0;  // s
  long samples = 0;            // how many
  PeakSample peak;             // the factor applied
  std::vector<std::string> processing = {};  // what was done to the record, one line each, in order

  // s, time of the last sample.
  double duration() const { return first_sample_at + step * static_cast<double>(samples - 1); }
};

}  // namespace pilotis
