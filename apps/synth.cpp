// pilotis synth: makes a ground motion and writes it as CSV.
#include <fmt/format.h>

#include <charconv>
#include <cmath>
#include <cstdio>
#include <filesystem>
#include <map>
#include <memory>

#include "apps/commands.hpp"
#include "core/error.hpp"
#include "core/motion/synthetic/registry.hpp"
#include "core/units/units.hpp"
#include "io/whole_file.hpp"

namespace pilotis {

namespace {

constexpr int sample_decimals = 6;  // of m/s2: made motions are rounded to as many

struct SynthOptions {
  std::string step = "0.01 s", duration = "20 s", output;
  std::uint64_t seed = 1;
  std::map<std::string, std::string> values;  // by key of the parameter, as typed
};

std::string option_name(std::string_view key) {
  std::string name = "--";
  for (char c : key) name += c == '_' ? '-' : c;
  return name;
}

// "0.35 g", "0.35g" or, in SI, "3.4".
double quantity(const std::string& text, Dimension dimension, const std::string& where) {
  double number = 0;
  const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), number);
  if (error != std::errc{})
    throw input_error(where, fmt::format("found \"{}\"", text),
                      fmt::format("a number is needed, with a unit or in {}", si_unit(dimension)));
  std::string unit(end, text.data() + text.size());
  unit.erase(0, unit.find_first_not_of(' '));
  return unit.empty() ? number : number * si_factor(unit, dimension, where);
}

std::vector<double> values_of(const Method& method, const SynthOptions& options) {
  std::vector<double> values;
  for (const Parameter& parameter : method.parameters) {
    const std::string& typed = options.values.at(std::string(parameter.key));
    const std::string where = "synth " + option_name(parameter.key);
    if (typed.empty() && !parameter.otherwise)
      throw input_error(where, "it is missing", fmt::format("{} is needed", parameter.meaning));
    values.push_back(typed.empty() ? *parameter.otherwise : quantity(typed, parameter.dimension, where));
  }
  return values;
}

// The command that made the motion, every value written out.
std::string command_line(const Method& method, const std::vector<double>& values, const SyntheticGrid& grid) {
  std::string text = fmt::format("pilotis synth {} --seed {} --step \"{} s\" --duration \"{} s\"", method.name,
                                 grid.seed, grid.step, grid.duration);
  for (std::size_t i = 0; i < values.size(); ++i) {
    const Parameter& parameter = method.parameters[i];
    const bool plain = parameter.dimension == Dimension::none;
    text += plain ? fmt::format(" {} {}", option_name(parameter.key), values[i])
                  : fmt::format(" {} \"{} {}\"", option_name(parameter.key), values[i], si_unit(parameter.dimension));
  }
  return text;
}

// As many as the step needs to be printed exactly, where it can be.
int time_decimals(double step) {
  constexpr int most = 9;
  for (int decimals = 0; decimals < most; ++decimals)
    if (std::stod(fmt::format("{:.{}f}", step, decimals)) == step) return decimals;
  return most;
}

std::string csv_of(const Accelerogram& record, const std::string& command, std::string_view summary) {
  const PeakSample peak = peak_of(record);
  std::string text = fmt::format("# made ground motion, {}\n# pilotis {}\n# {}\n", summary, PILOTIS_VERSION, command);
  text += fmt::format("# {} samples, peak {:.{}f} m/s^2 at {} s\n", record.samples.size(), peak.value, sample_decimals,
                      peak.time);
  text += fmt::format("# step: {} s\ntime (s), acceleration (m/s^2)\n", record.step);
  const int decimals = time_decimals(record.step);
  for (std::size_t i = 0; i < record.samples.size(); ++i)
    text += fmt::format("{:.{}f}, {:.{}f}\n", record.first_sample_at + record.step * static_cast<double>(i), decimals,
                        record.samples[i], sample_decimals);
  return text;
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

void synthesize(const Method& method, const SynthOptions& options) {
  const SyntheticGrid grid{options.seed, quantity(options.step, Dimension::time, "synth --step"),
                           quantity(options.duration, Dimension::time, "synth --duration")};
  const std::vector<double> values = values_of(method, options);
  const Accelerogram record = make_synthetic(method.name, values, grid, fmt::format("synth {}", method.name));
  const std::string csv = csv_of(record, command_line(method, values, grid), method.summary);
  if (options.output == "-") {
    fmt::print("{}", csv);
    return;
  }
  write_csv(options.output, csv);
  fmt::print(stderr, "{}: {} samples every {} s, peak {:.{}f} m/s2\n", options.output, record.samples.size(),
             record.step, peak_of(record).value, sample_decimals);
}

std::string help_of(const Parameter& parameter) {
  std::string text(parameter.meaning);
  const std::string unit =
      parameter.dimension == Dimension::none ? "" : fmt::format(" {}", si_unit(parameter.dimension));
  if (!unit.empty()) text += fmt::format(", e.g. \"1.5{}\"; a bare number is in{}", unit, unit);
  text += parameter.otherwise ? fmt::format(" [{}{}]", *parameter.otherwise, unit) : " (required)";
  const std::string range = allowed_range(parameter);
  return range.empty() ? text : fmt::format("{}; {}", text, range);
}

// For the command line's own checks: empty when it is one.
std::string whole_number(const std::string& text) {
  const bool digits = !text.empty() && text.find_first_not_of("0123456789") == std::string::npos;
  return digits ? "" : fmt::format("found \"{}\"; a whole number from 0 is needed", text);
}

void add_kind(CLI::App& synth, const Method& method) {
  auto options = std::make_shared<SynthOptions>();
  CLI::App* kind = synth.add_subcommand(std::string(method.name), std::string(method.summary));
  kind->add_option("--seed", options->seed, "the same seed gives the same motion on every machine [1]")
      ->check(whole_number);
  kind->add_option("--step", options->step, "time step, e.g. \"0.005 s\"; a bare number is in s [0.01 s]");
  kind->add_option("--duration", options->duration, "a whole number of steps; a bare number is in s [20 s]");
  kind->add_option("-o,--output", options->output, "CSV file to write, - for standard output")->required();
  for (const Parameter& parameter : method.parameters)
    kind->add_option(option_name(parameter.key), options->values[std::string(parameter.key)], help_of(parameter));
  kind->footer(fmt::format(
      "Example:\n  pilotis synth {} --seed 7 --step 0.01 --duration 20 --pga \"0.35 g\" -o motion.csv", method.name));
  kind->callback([options, method] { synthesize(method, *options); });
}

}  // namespace

void add_synth(CLI::App& app, int&) {
  CLI::App* synth = app.add_subcommand("synth", "make a ground motion and write it as CSV");
  synth->require_subcommand(1);
  synth->footer(
      "Example:\n  pilotis synth kanai_tajimi --seed 7 --step 0.01 --duration 20 --pga \"0.35 g\" -o motion.csv");
  for (const Method& method : synthetic_catalogue()) add_kind(*synth, method);
}

}  // namespace pilotis
