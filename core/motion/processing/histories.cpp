#include "core/motion/processing/histories.hpp"

#include "core/motion/synthetic/baseline.hpp"

namespace pilotis {

namespace {

// ground_velocity() and ground_displacement() add the zero after the last sample themselves.
std::vector<double> from_time_zero(const Accelerogram& record) {
  std::vector<double> samples = record.samples;
  if (record.first_sample_at > 0) samples.insert(samples.begin(), 0.0);
  return samples;
}

}  // namespace

std::vector<double> acceleration_history(const Accelerogram& record) {
  std::vector<double> samples = from_time_zero(record);
  samples.push_back(0.0);
  return samples;
}

std::vector<double> velocity_history(const Accelerogram& record) {
  return ground_velocity(from_time_zero(record), record.step);
}

std::vector<double> displacement_history(const Accelerogram& record) {
  return ground_displacement(from_time_zero(record), record.step);
}

}  // namespace pilotis
