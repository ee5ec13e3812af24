#include "io/study/process_section.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

constexpr std::string_view name_key = "step";

const Method& method_of(TableReader& table) {
  std::vector<std::string_view> names, keys{name_key};
  for (const Method& method : process_catalogue()) {
    names.push_back(method.name);
    for (const Parameter& parameter : method.parameters)
      if (std::find(keys.begin(), keys.end(), parameter.key) == keys.end()) keys.push_back(parameter.key);
  }
  // The keys of any step, so that a misspelled "step" is told apart from a missing one.
  if (!table.has(name_key)) table.known_keys(keys);
  const std::string meaning = fmt::format("name the processing step, one of {}", fmt::join(names, ", "));
  const std::string name = table.at(name_key, meaning).choice("processing step", names);
  const auto methods = process_catalogue();
  return *std::find_if(methods.begin(), methods.end(), [&](const Method& method) { return method.name == name; });
}

// make_process_step() names the key after the place it was given; show the line of that key.
[[noreturn]] void rethrow_at_key(const Error& error, const TableReader& table) {
  const std::string prefix = table.where() + ".";
  if (error.where().starts_with(prefix))
    if (const auto value = table.find(error.where().substr(prefix.size())))
      throw value->wrong(error.problem(), error.remedy());
  throw error;
}

ProcessStep read_step(const ValueReader& value) {
  TableReader table(value);
  const Method& method = method_of(table);
  const std::vector<double> values = read_parameters(table, method, name_key);
  try {
    return make_process_step(method.name, values, table.where());
  } catch (const Error& error) {
    rethrow_at_key(error, table);
  }
}

}  // namespace

std::vector<ProcessStep> read_process(const ValueReader& value) {
  if (value.node().kind != NodeKind::array)
    throw value.wrong_type(R"(a list of steps, such as [ { step = "remove_mean" } ], is needed)");
  std::vector<ProcessStep> steps;
  for (const ValueReader& item : value.items()) {
    if (item.node().kind != NodeKind::table)
      throw item.wrong_type(R"(a step, such as { step = "remove_mean" }, is needed)");
    steps.push_back(read_step(item));
  }
  return steps;
}

}  // namespace pilotis
