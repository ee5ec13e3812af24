#include "core/motion/accelerogram.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

void validate_step(double step, const std::string& where) {
  if (!std::isfinite(step) || step <= 0)
    throw input_error(where, fmt::format("found a time step of {:g} s", step),
                      "it must be finite and greater than 0 s");
}

void validate_first_sample(const Accelerogram& record, const std::string& where) {
  const double at = record.first_sample_at;
  if (at != 0 && at != record.step)
    throw input_error(where, fmt::format("found the first sample at {:g} s", at),
                      fmt::format("it must be at 0 s or at one step, {:g} s", record.step));
}

void validate_samples(const Accelerogram& record, const std::string& where) {
  if (record.samples.size() < 2)
    throw input_error(where, fmt::format("found {} sample(s)", record.samples.size()), "at least two are needed");
  for (std::size_t i = 0; i < record.samples.size(); ++i)
    if (!std::isfinite(record.samples[i]))
      throw input_error(where, fmt::format("sample {} of {} is {}", i + 1, record.samples.size(), record.samples[i]),
                        "every sample must be finite");
}

}  // namespace

void validate(const Accelerogram& record, const std::string& where) {
  validate_step(record.step, where);
  validate_samples(record, where);
  validate_first_sample(record, where);
}

PeakSample peak_of(const Accelerogram& record) {
  std::size_t largest = 0;
  for (std::size_t i = 1; i < record.samples.size(); ++i)
    if (std::abs(record.samples[i]) > std::abs(record.samples[largest])) largest = i;
  return {record.samples.at(largest), record.first_sample_at + record.step * static_cast<double>(largest)};
}

}  // namespace pilotis
