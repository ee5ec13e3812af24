#include "apps/fit_motions.hpp"

#include <fmt/format.h>
#include <tbb/parallel_for.h>
#include <unistd.h>

#include <algorithm>
#include <atomic>
#include <cmath>
#include <exception>
#include <filesystem>
#include <mutex>
#include <numbers>

#include "apps/progress.hpp"
#include "core/error.hpp"
#include "core/motion/spectra/oscillator_extremes.hpp"
#include "core/motion/spectra/rotated_spectrum.hpp"

namespace pilotis {

namespace fs = std::filesystem;

namespace {

bool is_file(const std::string& name) {
  std::error_code ignored;
  return fs::is_regular_file(name, ignored);
}

// The two files around a "+", where both are there.
std::vector<std::string> pair_of(const std::string& text) {
  for (std::size_t at = text.find('+'); at != std::string::npos; at = text.find('+', at + 1))
    if (is_file(text.substr(0, at)) && is_file(text.substr(at + 1))) return {text.substr(0, at), text.substr(at + 1)};
  return {};
}

// The files of a folder but hidden ones, sorted.
std::vector<FitMotion> files_in(const std::string& folder, const std::string& where) {
  std::vector<std::string> files;
  for (const fs::directory_entry& entry : fs::directory_iterator(folder))
    if (entry.is_regular_file() && entry.path().filename().string().front() != '.')
      files.push_back(entry.path().string());
  if (files.empty())
    throw input_error(where, fmt::format("found the folder \"{}\" without files", folder), "records are needed");
  std::sort(files.begin(), files.end());
  std::vector<FitMotion> motions;
  for (const std::string& file : files) motions.push_back({file, {file}});
  return motions;
}

void require_alike(const std::vector<FitMotion>& motions, const std::string& where) {
  const auto pairs = std::count_if(motions.begin(), motions.end(), [](const FitMotion& m) { return m.is_pair(); });
  if (pairs != 0 && pairs != static_cast<std::ptrdiff_t>(motions.size()))
    throw input_error(where, fmt::format("found {} pairs A+B beside {} single records", pairs, motions.size() - pairs),
                      "give pairs only (their maximum direction is fitted) or single records only");
}

double largest_sample(const std::vector<Accelerogram>& components) {
  double largest = 0;
  for (const Accelerogram& component : components) largest = std::max(largest, std::abs(peak_of(component).value));
  return largest;
}

MotionSpectrum spectrum_of(const FitMotion& motion, std::span<const Oscillator> oscillators, const RecordHints& hints) {
  const std::vector<Accelerogram> components = components_of(motion, hints);
  return {pseudo_accelerations(components, oscillators, motion.name), largest_sample(components)};
}

}  // namespace

std::vector<FitMotion> motions_typed(const std::vector<std::string>& typed, const std::string& where) {
  std::vector<FitMotion> motions;
  for (const std::string& text : typed) {
    std::error_code ignored;
    if (fs::is_directory(text, ignored)) {
      const std::vector<FitMotion> found = files_in(text, where);
      motions.insert(motions.end(), found.begin(), found.end());
    } else if (is_file(text)) {
      motions.push_back({text, {text}});
    } else if (std::vector<std::string> pair = pair_of(text); !pair.empty()) {
      motions.push_back({text, std::move(pair)});
    } else {
      throw input_error(where, fmt::format("there is no file \"{}\"", text),
                        "give records, pairs of components as A+B, or folders of records");
    }
  }
  require_alike(motions, where);
  return motions;
}

std::vector<Accelerogram> components_of(const FitMotion& motion, const RecordHints& hints) {
  std::vector<Accelerogram> components;
  std::size_t longest = 0;
  for (const std::string& file : motion.files) {
    components.push_back(read_record(file, hints).record);
    longest = std::max(longest, components.back().samples.size());
  }
  for (Accelerogram& component : components) component.samples.resize(longest, 0.0);
  return components;
}

std::vector<double> pseudo_accelerations(std::span<const Accelerogram> components,
                                         std::span<const Oscillator> oscillators, const std::string& where) {
  std::vector<double> displacements;
  if (components.size() == 1) {
    std::vector<OscillatorExtremes> extremes(oscillators.size());
    oscillator_extremes(ground_of(components[0]), oscillators, {}, extremes, where);
    for (const OscillatorExtremes& each : extremes) displacements.push_back(each.displacement.largest());
  } else {
    std::vector<RotatedPeak> peaks(oscillators.size());
    rotated_peaks(ground_of(components[0]), ground_of(components[1]), oscillators, {}, peaks, where);
    for (const RotatedPeak& peak : peaks) displacements.push_back(peak.largest);
  }
  for (std::size_t i = 0; i < displacements.size(); ++i)
    displacements[i] *= std::pow(2 * std::numbers::pi / oscillators[i].period, 2);
  return displacements;
}

std::vector<MotionSpectrum> spectra_of(const std::vector<FitMotion>& motions, std::span<const Oscillator> oscillators,
                                       const RecordHints& hints) {
  std::vector<MotionSpectrum> spectra(motions.size());
  std::vector<std::exception_ptr> errors(motions.size());
  Progress progress(isatty(STDERR_FILENO) != 0, false, 0, "records");
  std::atomic<long> done = 0;
  std::mutex one_at_a_time;
  tbb::parallel_for(std::size_t{0}, motions.size(), [&](std::size_t i) {
    try {
      spectra[i] = spectrum_of(motions[i], oscillators, hints);
    } catch (...) {
      errors[i] = std::current_exception();
    }
    const long now = ++done;
    if (const std::unique_lock lock(one_at_a_time, std::try_to_lock); lock)
      progress.show(static_cast<double>(now), static_cast<long>(motions.size()));
  });
  progress.finish();
  for (const std::exception_ptr& error : errors)
    if (error) std::rethrow_exception(error);
  return spectra;
}

}  // namespace pilotis
