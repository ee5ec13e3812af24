// A processing step, the intensity measures or the Fourier amplitudes of numbers on standard input (the step in s, then
// the samples in m/s2), for scripts that compare with other libraries.
// Usage: motion_filter process NAME VALUE...  |  motion_filter measures  |  motion_filter fourier SPACING
#include <fmt/format.h>

#include <cstdlib>
#include <iostream>

#include "core/error.hpp"
#include "core/motion/measures/fourier.hpp"
#include "core/motion/measures/registry.hpp"
#include "core/motion/processing/registry.hpp"

namespace {

using namespace pilotis;

Accelerogram from_input() {
  Accelerogram record;
  std::cin >> record.step;
  for (double sample = 0; std::cin >> sample;) record.samples.push_back(sample);
  validate(record, "standard input");
  return record;
}

void run_step(const std::vector<std::string>& words) {
  std::vector<double> values;
  for (std::size_t i = 2; i < words.size(); ++i) values.push_back(std::stod(words[i]));
  const Processed out = process(make_process_step(words.at(1), values, "arguments"), from_input());
  for (const double sample : out.record.samples) fmt::print("{:.17g}\n", sample);
  fmt::print(stderr, "{}\n", out.done);
}

void show_measures() {
  const Accelerogram record = from_input();
  for (const Measure& measure : measure_catalogue())
    if (measure.of_record != nullptr) fmt::print("{} {:.17g}\n", measure.name, measure.of_record(record));
}

void show_fourier(double spacing) {
  const FourierAmplitudes spectrum = fourier_amplitudes(from_input(), spacing);
  for (std::size_t i = 0; i < spectrum.frequencies.size(); ++i)
    fmt::print("{:.17g} {:.17g}\n", spectrum.frequencies[i], spectrum.amplitudes[i]);
}

}  // namespace

int main(int count, char** arguments) {
  const std::vector<std::string> words(arguments + 1, arguments + count);
  try {
    if (words.at(0) == "process") run_step(words);
    if (words.at(0) == "measures") show_measures();
    if (words.at(0) == "fourier") show_fourier(std::stod(words.at(1)));
    return 0;
  } catch (const std::exception& e) {
    fmt::print(stderr, "{}\n", e.what());
    return 1;
  }
}
