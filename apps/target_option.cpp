#include "apps/target_option.hpp"

#include <fmt/format.h>

#include <set>

#include "apps/synth_curve.hpp"
#include "apps/typed_values.hpp"
#include "core/error.hpp"
#include "core/motion/target/registry.hpp"
#include "core/motion/target/table.hpp"

namespace pilotis {

namespace {

constexpr std::string_view damping_key = "damping";

std::string names() {
  std::string text;
  for (const Method& method : target_catalogue()) text += fmt::format("{}{}", text.empty() ? "" : ", ", method.name);
  return text;
}

const Method& method_of(const TypedTarget& typed, std::string_view command) {
  for (const Method& method : target_catalogue())
    if (method.name == typed.name) return method;
  throw input_error(fmt::format("{} --target", command), fmt::format("there is no target spectrum \"{}\"", typed.name),
                    fmt::format("one of {} is needed, or a table by --target-file", names()));
}

// Every target's parameters but the damping ratio, each key once, with the targets that take it.
std::map<std::string_view, std::pair<Parameter, std::string>> parameters_of_all() {
  std::map<std::string_view, std::pair<Parameter, std::string>> all;
  for (const Method& method : target_catalogue())
    for (const Parameter& parameter : method.parameters) {
      if (parameter.key == damping_key) continue;
      auto& [first, takers] = all.try_emplace(parameter.key, parameter, "").first->second;
      takers += fmt::format("{}{}", takers.empty() ? "" : ", ", method.name);
    }
  return all;
}

void require_one(const TypedTarget& typed, std::string_view command) {
  if (typed.name.empty() && typed.file.empty())
    throw input_error(fmt::format("{} --target", command), "it is missing",
                      fmt::format("give one of {}, or a table by --target-file", names()));
  if (!typed.name.empty() && !typed.file.empty())
    throw input_error(fmt::format("{} --target", command), "found --target-file beside it", "give one of the two");
}

TargetSpectrum table_target(const TypedTarget& typed, double damping) {
  const Curve curve = read_curve(typed.file, target_table_columns());
  return target_from({curve.x, curve.y, damping, Between::log_log, typed.file}, typed.file);
}

}  // namespace

CurveParameter target_table_columns() {
  return {"target-file",
          "period",
          "acceleration",
          Dimension::time,
          Dimension::acceleration,
          "target spectrum, pseudo-acceleration over period",
          true,
          true};
}

void add_target_options(CLI::App& command, TypedTarget& typed) {
  command.add_option("--target", typed.name, fmt::format("target spectrum by name: {}", names()));
  command.add_option("--target-file", typed.file,
                     fmt::format("target spectrum as a table, log-log between its rows: a file with the columns \"{}\" "
                                 "(other units may stand there)",
                                 curve_heading(target_table_columns())));
  for (const auto& [key, entry] : parameters_of_all())
    command.add_option(option_name(key), typed.values[std::string(key)],
                       fmt::format("{}: {}", entry.second, help_of(entry.first)));
}

std::vector<double> target_values(const Method& target, const TypedTarget& typed, double damping,
                                  std::string_view command) {
  std::vector<double> values;
  for (const Parameter& parameter : target.parameters) {
    const auto text = typed.values.find(std::string(parameter.key));
    values.push_back(parameter.key == damping_key
                         ? damping
                         : typed_value(parameter, text == typed.values.end() ? "" : text->second, command));
  }
  return values;
}

TargetSpectrum target_of(const TypedTarget& typed, double damping, std::string_view command) {
  require_one(typed, command);
  if (!typed.file.empty()) return table_target(typed, damping);
  const Method& method = method_of(typed, command);
  TargetSpectrum target =
      make_target(method.name, target_values(method, typed, damping, command), fmt::format("{} --target", command));
  if (target.damping() != damping)
    throw input_error(
        fmt::format("{} --damping", command), fmt::format("found {:g}", damping),
        fmt::format("the target is for {:g}; for another damping give a table: {}", target.damping(), method.summary));
  return target;
}

std::string target_text(const TypedTarget& typed, double damping, std::string_view command) {
  require_one(typed, command);
  if (!typed.file.empty()) return fmt::format("--target-file \"{}\"", typed.file);
  const Method& method = method_of(typed, command);
  const std::vector<double> values = target_values(method, typed, damping, command);
  std::string text = fmt::format("--target {}", method.name);
  for (std::size_t i = 0; i < values.size(); ++i)
    if (method.parameters[i].key != damping_key)
      text += fmt::format(" {} {}", option_name(method.parameters[i].key), value_text(method.parameters[i], values[i]));
  return text;
}

}  // namespace pilotis
