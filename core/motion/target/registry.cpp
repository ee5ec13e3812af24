#include "core/motion/target/registry.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <vector>

#include "core/error.hpp"
#include "core/motion/target/asce_7_16.hpp"
#include "core/motion/target/en_1998.hpp"

namespace pilotis {

namespace {

struct Entry {
  Method method;
  TargetSpectrum (*make)(std::span<const double>);
};

template <class T>
Entry entry() {
  return {T::method, [](std::span<const double> values) { return T::make(values).spectrum(); }};
}

const std::vector<Entry>& entries() {
  static const std::vector<Entry> all{entry<En1998Elastic>(), entry<Asce716Design>(), entry<Asce716Mcer>()};
  return all;
}

TargetSpectrum made(const Entry& entry, std::span<const double> values, const std::string& where) {
  const auto parameters = entry.method.parameters;
  if (values.size() != parameters.size())
    throw input_error(where, fmt::format("found {} values", values.size()),
                      fmt::format("{} takes {}", entry.method.name, parameters.size()));
  for (std::size_t i = 0; i < values.size(); ++i)
    require_allowed(parameters[i], values[i], fmt::format("{}.{}", where, parameters[i].key));
  try {
    return entry.make(values);
  } catch (const Error& e) {
    throw Error(e.kind(), where + "." + e.where(), e.problem(), e.remedy());
  }
}

}  // namespace

std::span<const Method> target_catalogue() {
  static const std::vector<Method> methods = [] {
    std::vector<Method> list;
    for (const Entry& entry : entries()) list.push_back(entry.method);
    return list;
  }();
  return methods;
}

TargetSpectrum make_target(std::string_view name, std::span<const double> values, const std::string& where) {
  std::vector<std::string_view> known;
  for (const Entry& entry : entries()) {
    if (entry.method.name == name) return made(entry, values, where);
    known.push_back(entry.method.name);
  }
  throw input_error(where, fmt::format("there is no target spectrum \"{}\"", name),
                    fmt::format("one of {}, or a table", fmt::join(known, ", ")));
}

}  // namespace pilotis
