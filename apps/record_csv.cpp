#include "apps/record_csv.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

namespace {

// As many as the step needs to be printed exactly, where it can be.
int time_decimals(double step) {
  constexpr int most = 9;
  for (int decimals = 0; decimals < most; ++decimals)
    if (std::stod(fmt::format("{:.{}f}", step, decimals)) == step) return decimals;
  return most;
}

}  // namespace

std::string record_csv(const Accelerogram& record, const std::vector<std::string>& remarks, int decimals) {
  const PeakSample peak = peak_of(record);
  std::string text;
  for (const std::string& remark : remarks) text += fmt::format("# {}\n", remark);
  text +=
      fmt::format("# {} samples, peak {:.{}f} m/s^2 at {} s\n", record.samples.size(), peak.value, decimals, peak.time);
  text += fmt::format("# step: {} s\ntime (s), acceleration (m/s^2)\n", record.step);
  const int places = time_decimals(record.step);
  for (std::size_t i = 0; i < record.samples.size(); ++i)
    text += fmt::format("{:.{}f}, {:.{}f}\n", record.first_sample_at + record.step * static_cast<double>(i), places,
                        record.samples[i], decimals);
  return text;
}

void round_samples(Accelerogram& record, int decimals) {
  const double scale = std::pow(10.0, decimals);
  for (double& sample : record.samples) sample = std::round(sample * scale) / scale;
}

void write_text_file(const std::filesystem::path& file, const std::string& text, const std::string& where) {
  const std::filesystem::path folder = file.has_parent_path() ? file.parent_path() : ".";
  std::error_code ignored;
  if (!file.has_filename() || std::filesystem::is_directory(file, ignored))
    throw input_error(where, fmt::format("found \"{}\", a folder", file.string()),
                      "the name of a file to write is needed");
  if (!std::filesystem::is_directory(folder, ignored))
    throw input_error(where, fmt::format("found \"{}\"", file.string()),
                      fmt::format("there is no folder \"{}\": make it first", folder.string()));
  WholeFile whole(file);
  whole.write(text);
  whole.commit();
}

}  // namespace pilotis
