// pilotis synth: makes ground motions and writes them as CSV.
#include <fmt/format.h>

#include <cstdio>
#include <filesystem>
#include <map>
#include <memory>

#include "apps/commands.hpp"
#include "apps/synth_curve.hpp"
#include "apps/synth_file.hpp"
#include "apps/synth_target.hpp"
#include "apps/text_table.hpp"
#include "apps/typed_values.hpp"
#include "core/error.hpp"
#include "core/motion/synthetic/registry.hpp"
#include "core/units/units.hpp"

namespace pilotis {

namespace {

struct SynthOptions {
  std::string step = "0.01 s", duration = "20 s", output;
  std::uint64_t seed = 1;
  int count = 0;                              // 0: one motion into a file; else a suite into a folder
  std::map<std::string, std::string> values;  // by key of the parameter or table, as typed
  SynthTarget target;
};

// The kind's table as typed.
void add_curve(const CurveParameter& curve, const SynthOptions& options, SynthRecipe& recipe) {
  if (curve.is_target) {
    const std::vector<double>& values = recipe.values;
    const auto parameters = recipe.kind->method.parameters;
    std::size_t damping = 0;
    while (parameters[damping].key != "damping") ++damping;
    return add_target(options.target, values[damping], recipe);
  }
  const std::string option = option_name(curve.key), &file = options.values.at(std::string(curve.key));
  if (file.empty() && curve.required)
    throw input_error("synth " + option, "it is missing",
                      fmt::format("{} is needed: a file with the columns \"{}\"", curve.meaning, curve_heading(curve)));
  recipe.curves.push_back(file.empty() ? Curve{} : read_curve(file, curve));
  recipe.curve_options.push_back(file.empty() ? "" : fmt::format("{} \"{}\"", option, file));
}

SynthRecipe recipe_of(const SyntheticKind& kind, const SynthOptions& options) {
  SynthRecipe recipe{&kind, {}, {}, {}, {}, {}};
  recipe.grid = {options.seed, typed_quantity(options.step, Dimension::time, "synth --step"),
                 typed_quantity(options.duration, Dimension::time, "synth --duration")};
  for (const Parameter& parameter : kind.method.parameters)
    recipe.values.push_back(typed_value(parameter, options.values.at(std::string(parameter.key)), "synth"));
  for (const CurveParameter& curve : kind.curves) add_curve(curve, options, recipe);
  return recipe;
}

MadeMotion motion_of(const SynthRecipe& recipe) {
  const std::string_view name = recipe.kind->method.name;
  return make_synthetic(name, recipe.values, recipe.curves, recipe.grid, fmt::format("synth {}", name));
}

void write_one(const SynthRecipe& recipe, const std::string& output) {
  const MadeMotion motion = motion_of(recipe);
  const std::string csv = csv_of(motion, recipe);
  if (output == "-") {
    fmt::print("{}", csv);
    return;
  }
  write_csv(output, csv);
  fmt::print(stderr, "{}: {}\n", output, short_facts(motion.record));
}

// Motion i of the suite has the seed `seed + i`. Names sort as seeds do.
void write_suite(SynthRecipe recipe, int count, const std::filesystem::path& folder) {
  const std::uint64_t first = recipe.grid.seed, last = first + static_cast<std::uint64_t>(count) - 1;
  if (last < first)
    throw input_error("synth --seed", fmt::format("found {} for {} motions", first, count), "a lower one is needed");
  const std::size_t digits = fmt::format("{}", last).size();
  motion_of(recipe);  // what is wrong shows before anything is made
  std::error_code failed;
  std::filesystem::create_directory(folder, failed);
  if (!std::filesystem::is_directory(folder))
    throw input_error("synth --output", fmt::format("found \"{}\"", folder.string()),
                      "the name of a folder, or of one that can be made, is needed");
  for (recipe.grid.seed = first; recipe.grid.seed - first < static_cast<std::uint64_t>(count); ++recipe.grid.seed) {
    const std::filesystem::path file =
        folder / fmt::format("{}-{:0{}}.csv", recipe.kind->method.name, recipe.grid.seed, digits);
    write_csv(file, csv_of(motion_of(recipe), recipe));
  }
  fmt::print(stderr, "{}: {} motions, seeds {} to {}\n", folder.string(), count, first, last);
}

void synthesize(const SyntheticKind& kind, const SynthOptions& options) {
  const SynthRecipe recipe = recipe_of(kind, options);
  if (options.count == 0) return write_one(recipe, options.output);
  write_suite(recipe, options.count, options.output);
}

std::string help_of(const CurveParameter& curve) {
  return fmt::format("{}: a file with the columns \"{}\" (other units may stand there){}", curve.meaning,
                     curve_heading(curve), curve.required ? " (required)" : "");
}

// Every kind with its parameters.
void list_kinds() {
  for (const SyntheticKind& kind : synthetic_catalogue()) {
    fmt::print("{}: {}\n", kind.method.name, kind.method.summary);
    using enum TextTable::Align;
    TextTable table({{"option", left}, {"default", left}, {"allowed", left}, {"meaning", left}});
    if (kind.random) table.add_row({"--seed", "1", "a whole number from 0", "the same seed gives the same motion"});
    for (const Parameter& parameter : kind.method.parameters)
      table.add_row({option_name(parameter.key), default_text(parameter), allowed_range(parameter),
                     std::string(parameter.meaning)});
    for (const CurveParameter& curve : kind.curves)
      table.add_row({curve.is_target ? "--target-file" : option_name(curve.key), curve.required ? "required" : "none",
                     fmt::format("a file: {}{}", curve_heading(curve), curve.is_target ? "; or --target by name" : ""),
                     std::string(curve.meaning)});
    fmt::print("{}\n", table.text());
  }
}

// For the command line's own checks: empty when it is one. A leading zero would make it octal.
std::string whole_number(const std::string& text) {
  const bool digits = !text.empty() && text.find_first_not_of("0123456789") == std::string::npos;
  return digits && (text.size() == 1 || text.front() != '0')
             ? ""
             : fmt::format("found \"{}\"; a whole number from 0 is needed", text);
}

// An example of the kind that works as it stands, with what is required besides.
std::string example_of(const SyntheticKind& kind) {
  std::string text = fmt::format("pilotis synth {}", kind.method.name);
  if (kind.random) text += " --seed 7";
  return text + std::string(kind.example) + " -o motion.csv";
}

void add_kind(CLI::App& synth, const SyntheticKind& kind) {
  auto options = std::make_shared<SynthOptions>();
  CLI::App* command = synth.add_subcommand(std::string(kind.method.name), std::string(kind.method.summary));
  if (kind.random) {
    command->add_option("--seed", options->seed, "the same seed gives the same motion on every machine [1]")
        ->check(whole_number);
    command->add_option("--count", options->count, "makes a suite of 1 to 10000 motions, of seeds seed, seed + 1, ...")
        ->check(CLI::Range(1, 10000));
  }
  command->add_option("--step", options->step, "time step, e.g. \"0.005 s\"; a bare number is in s [0.01 s]");
  command->add_option("--duration", options->duration, "a whole number of steps; a bare number is in s [20 s]");
  command
      ->add_option("-o,--output", options->output,
                   kind.random ? "CSV file to write, - for standard output; with --count, the folder to write into"
                               : "CSV file to write, - for standard output")
      ->required();
  for (const Parameter& parameter : kind.method.parameters)
    command->add_option(option_name(parameter.key), options->values[std::string(parameter.key)], help_of(parameter));
  for (const CurveParameter& curve : kind.curves)
    if (curve.is_target)
      add_synth_target_options(*command, options->target);
    else
      command->add_option(option_name(curve.key), options->values[std::string(curve.key)], help_of(curve));
  command->footer("Example:\n  " + example_of(kind));
  command->callback([options, &kind] { synthesize(kind, *options); });
}

}  // namespace

void add_synth(CLI::App& app, int&) {
  CLI::App* synth = app.add_subcommand("synth", "make ground motions and write them as CSV");
  auto list = std::make_shared<bool>(false);
  synth->add_flag("--list", *list, "shows every kind with its parameters, their units and ranges");
  synth->require_subcommand(0, 1);
  std::string examples = "Examples:\n  pilotis synth --list\n";
  for (const SyntheticKind& kind : synthetic_catalogue()) {
    add_kind(*synth, kind);
    examples += "  " + example_of(kind) + "\n";
  }
  synth->footer(examples + "  pilotis synth kanai_tajimi --pga \"0.35 g\" --count 11 -o motions");
  synth->callback([synth, list] {
    if (*list) return list_kinds();
    if (synth->get_subcommands().empty())
      throw input_error("synth", "the kind of motion is missing", "give one of those that pilotis synth --list shows");
  });
}

}  // namespace pilotis
