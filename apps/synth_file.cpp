#include "apps/synth_file.hpp"

#include <fmt/format.h>

#include "apps/record_csv.hpp"
#include "apps/synth_curve.hpp"
#include "apps/typed_values.hpp"

namespace pilotis {

namespace {

constexpr int sample_decimals = 6;  // of m/s2: made motions are rounded to as many

void add_tables(const SynthRecipe& recipe, std::vector<std::string>& remarks) {
  for (std::size_t i = 0; i < recipe.curves.size(); ++i) {
    if (recipe.curves[i].x.empty()) continue;
    remarks.push_back(fmt::format("{}: {}", recipe.kind->curves[i].key, curve_heading(recipe.kind->curves[i])));
    for (std::size_t k = 0; k < recipe.curves[i].x.size(); ++k)
      remarks.push_back(fmt::format("  {}, {}", recipe.curves[i].x[k], recipe.curves[i].y[k]));
  }
}

}  // namespace

std::string command_line(const SynthRecipe& recipe) {
  const Method& method = recipe.kind->method;
  std::string text = fmt::format("pilotis synth {}", method.name);
  if (recipe.kind->random) text += fmt::format(" --seed {}", recipe.grid.seed);
  text += fmt::format(" --step \"{} s\" --duration \"{} s\"", recipe.grid.step, recipe.grid.duration);
  for (std::size_t i = 0; i < recipe.values.size(); ++i) {
    const Parameter& parameter = method.parameters[i];
    text += fmt::format(" {} {}", option_name(parameter.key), value_text(parameter, recipe.values[i]));
  }
  for (const std::string& option : recipe.curve_options)
    if (!option.empty()) text += " " + option;
  return text;
}

std::string csv_of(const MadeMotion& motion, const SynthRecipe& recipe) {
  std::vector<std::string> remarks{fmt::format("made ground motion, {}", recipe.kind->method.summary),
                                   fmt::format("pilotis {}", PILOTIS_VERSION), command_line(recipe)};
  remarks.insert(remarks.end(), recipe.notes.begin(), recipe.notes.end());
  remarks.insert(remarks.end(), motion.notes.begin(), motion.notes.end());
  add_tables(recipe, remarks);
  return record_csv(motion.record, remarks, sample_decimals);
}

std::string short_facts(const Accelerogram& record) {
  return fmt::format("{} samples every {} s, peak {:.{}f} m/s2", record.samples.size(), record.step,
                     peak_of(record).value, sample_decimals);
}

void write_csv(const std::filesystem::path& file, const std::string& csv) {
  write_text_file(file, csv, "synth --output");
}

}  // namespace pilotis
