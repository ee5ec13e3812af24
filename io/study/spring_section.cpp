#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

const Method& method_named(std::span<const Method> methods, std::string_view name) {
  return *std::find_if(methods.begin(), methods.end(), [&](const Method& m) { return m.name == name; });
}

std::vector<std::string_view> law_names() {
  std::vector<std::string_view> names;
  for (const Method& method : law_catalogue()) names.push_back(method.name);
  return names;
}

// make_law() names the key after the place it was given; show the line of that key.
[[noreturn]] void rethrow_at_key(const Error& error, const TableReader& table) {
  const std::string prefix = table.where() + ".";
  if (error.where().starts_with(prefix))
    if (const auto value = table.find(error.where().substr(prefix.size())))
      throw value->wrong(error.problem(), error.remedy());
  throw error;
}

}  // namespace

Parameter whole_number(std::string_view key, std::string_view meaning, double least, double most,
                       std::optional<double> otherwise) {
  return {key, Dimension::none, meaning, otherwise, least, most, true, true, true};
}

std::vector<double> read_parameters(TableReader& table, const Method& method, std::string_view name_key) {
  std::vector<std::string_view> keys{name_key};
  for (const Parameter& parameter : method.parameters) keys.push_back(parameter.key);
  table.known_keys(keys);
  std::vector<double> values;
  for (const Parameter& parameter : method.parameters) values.push_back(table.quantity(parameter));
  return values;
}

Law read_spring(const ValueReader& value) {
  TableReader table(value);
  std::vector<std::string_view> keys{"law"};
  for (const Method& method : law_catalogue())
    for (const Parameter& parameter : method.parameters)
      if (std::find(keys.begin(), keys.end(), parameter.key) == keys.end()) keys.push_back(parameter.key);
  // The keys of any law, so that a misspelled "law" is told apart from a missing one.
  if (!table.has("law")) table.known_keys(keys);
  const std::vector<std::string_view> names = law_names();
  const std::string name =
      table.at("law", fmt::format("name the law, one of {}", fmt::join(names, ", "))).choice("law", names);
  const std::vector<double> values = read_parameters(table, method_named(law_catalogue(), name), "law");
  try {
    return make_law(name, values, table.where());
  } catch (const Error& error) {
    rethrow_at_key(error, table);
  }
}

}  // namespace pilotis
