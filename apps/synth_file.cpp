#include "apps/synth_file.hpp"

#include <fmt/format.h>

#include "apps/synth_curve.hpp"
#include "core/error.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

namespace {

constexpr int sample_decimals = 6;  // of m/s2: made motions are rounded to as many

std::string value_text(const Parameter& parameter, double value) {
  if (!parameter.choices.empty()) return std::string(parameter.choices[static_cast<std::size_t>(value)]);
  if (parameter.dimension == Dimension::none) return fmt::format("{}", value);
  return fmt::format("\"{} {}\"", value, si_unit(parameter.dimension));
}

// As many as the step needs to be printed exactly, where it can be.
int time_decimals(double step) {
  constexpr int most = 9;
  for (int decimals = 0; decimals < most; ++decimals)
    if (std::stod(fmt::format("{:.{}f}", step, decimals)) == step) return decimals;
  return most;
}

std::string tables_text(const SynthRecipe& recipe) {
  std::string text;
  for (std::size_t i = 0; i < recipe.curves.size(); ++i) {
    if (recipe.curves[i].x.empty()) continue;
    text += fmt::format("# {}: {}\n", recipe.kind->curves[i].key, curve_heading(recipe.kind->curves[i]));
    for (std::size_t k = 0; k < recipe.curves[i].x.size(); ++k)
      text += fmt::format("#   {}, {}\n", recipe.curves[i].x[k], recipe.curves[i].y[k]);
  }
  return text;
}

}  // namespace

std::string option_name(std::string_view key) {
  std::string name = "--";
  for (char c : key) name += c == '_' ? '-' : c;
  return name;
}

std::string command_line(const SynthRecipe& recipe) {
  const Method& method = recipe.kind->method;
  std::string text = fmt::format("pilotis synth {}", method.name);
  if (recipe.kind->random) text += fmt::format(" --seed {}", recipe.grid.seed);
  text += fmt::format(" --step \"{} s\" --duration \"{} s\"", recipe.grid.step, recipe.grid.duration);
  for (std::size_t i = 0; i < recipe.values.size(); ++i) {
    const Parameter& parameter = method.parameters[i];
    text += fmt::format(" {} {}", option_name(parameter.key), value_text(parameter, recipe.values[i]));
  }
  for (std::size_t i = 0; i < recipe.curve_files.size(); ++i)
    if (!recipe.curve_files[i].empty())
      text += fmt::format(" {} \"{}\"", option_name(recipe.kind->curves[i].key), recipe.curve_files[i]);
  return text;
}

std::string csv_of(const MadeMotion& motion, const SynthRecipe& recipe) {
  const Accelerogram& record = motion.record;
  const PeakSample peak = peak_of(record);
  std::string text = fmt::format("# made ground motion, {}\n# pilotis {}\n# {}\n", recipe.kind->method.summary,
                                 PILOTIS_VERSION, command_line(recipe));
  for (const std::string& note : motion.notes) text += fmt::format("# {}\n", note);
  text += tables_text(recipe);
  text += fmt::format("# {} samples, peak {:.{}f} m/s^2 at {} s\n", record.samples.size(), peak.value, sample_decimals,
                      peak.time);
  text += fmt::format("# step: {} s\ntime (s), acceleration (m/s^2)\n", record.step);
  const int decimals = time_decimals(record.step);
  for (std::size_t i = 0; i < record.samples.size(); ++i)
    text += fmt::format("{:.{}f}, {:.{}f}\n", record.first_sample_at + record.step * static_cast<double>(i), decimals,
                        record.samples[i], sample_decimals);
  return text;
}

std::string short_facts(const Accelerogram& record) {
  return fmt::format("{} samples every {} s, peak {:.{}f} m/s2", record.samples.size(), record.step,
                     peak_of(record).value, sample_decimals);
}

void write_csv(const std::filesystem::path& file, const std::string& csv) {
  const std::filesystem::path folder = file.has_parent_path() ? file.parent_path() : ".";
  std::error_code ignored;
  if (!file.has_filename() || std::filesystem::is_directory(file, ignored))
    throw input_error("synth --output", fmt::format("found \"{}\", a folder", file.string()),
                      "the name of a file to write is needed");
  if (!std::filesystem::is_directory(folder, ignored))
    throw input_error("synth --output", fmt::format("found \"{}\"", file.string()),
                      fmt::format("there is no folder \"{}\": make it first", folder.string()));
  WholeFile whole(file);
  whole.write(csv);
  whole.commit();
}

}  // namespace pilotis
