#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>

#include "io/study/sections.hpp"

namespace pilotis {

namespace {

constexpr Parameter step{"step", Dimension::time, "the time step", {}, 0.0, 1e300, false};
constexpr Parameter duration{"duration", Dimension::time, "the duration of a run", {}, 0.0, 1e300, false};

std::optional<double> read_step(const TableReader& table) {
  const auto value = table.find("step");
  if (!value || (value->node().kind == NodeKind::text && value->node().text == "auto")) return std::nullopt;
  try {
    return value->quantity(step);
  } catch (const Error& error) {
    throw Error(error.kind(), error.where(), error.problem(), error.remedy() + ", or \"auto\"");
  }
}

SchemeChoice read_scheme(const ValueReader& value, std::span<const Method> schemes) {
  TableReader table(value);
  std::vector<std::string_view> names, keys{"name"};
  for (const Method& method : schemes) {
    names.push_back(method.name);
    for (const Parameter& parameter : method.parameters)
      if (std::find(keys.begin(), keys.end(), parameter.key) == keys.end()) keys.push_back(parameter.key);
  }
  // The keys of any scheme, so that a misspelled "name" is told apart from a missing one.
  if (!table.has("name")) table.known_keys(keys);
  const std::string name =
      table.at("name", fmt::format("name the scheme, one of {}", fmt::join(names, ", "))).choice("scheme", names);
  const auto method = std::find_if(schemes.begin(), schemes.end(), [&](const Method& m) { return m.name == name; });
  return {name, read_parameters(table, *method, "name")};
}

}  // namespace

MarchSettings default_march(std::span<const Method> schemes) {
  MarchSettings march;
  march.scheme.name = std::string(schemes.front().name);
  for (const Parameter& parameter : schemes.front().parameters)
    march.scheme.values.push_back(parameter.otherwise.value_or(0.0));
  return march;
}

MarchSettings read_march(TableReader table, std::span<const Method> schemes) {
  table.known_keys(
      {"scheme", "step", "tail", "duration", "error_check", "collapse_drift_ratio", "tolerance", "halvings"});
  MarchSettings march = default_march(schemes);
  if (const auto scheme = table.find("scheme")) march.scheme = read_scheme(*scheme, schemes);
  march.step = read_step(table);
  march.tail = table.quantity({"tail", Dimension::time, "the free vibration after each motion", march.tail, 0.0});
  march.duration = table.quantity_if_given(duration);
  if (march.duration && table.has("tail"))
    throw table.at("duration", "").wrong("found both duration and tail", "the one sets the end of a run, or the other");
  march.error_check = table.flag_or("error_check", march.error_check);
  march.collapse_drift_ratio =
      table.quantity({"collapse_drift_ratio", Dimension::none, "the drift ratio at which a story counts as collapsed",
                      march.collapse_drift_ratio, 0.0, 1e300, false});
  march.tolerance = table.quantity({"tolerance", Dimension::none, "the out-of-balance force over the largest load",
                                    march.tolerance, 0.0, 1.0, false, false});
  march.halvings = static_cast<int>(table.quantity(
      whole_number("halvings", "how often a step that does not converge is halved", 0, 40, march.halvings)));
  return march;
}

}  // namespace pilotis
