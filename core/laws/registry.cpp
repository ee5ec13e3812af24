#include "core/laws/registry.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <array>
#include <vector>

#include "core/error.hpp"

namespace pilotis {

namespace {

template <class L>
Law made(std::span<const double> values) {
  return L::make(values);
}

struct Entry {
  Method method;
  Law (*make)(std::span<const double>);
};

template <class... L>
constexpr std::array<Entry, sizeof...(L)> entries(LawList<L...>) {
  return {Entry{L::method, &made<L>}...};
}

template <class... L>
constexpr std::array<Method, sizeof...(L)> methods(LawList<L...>) {
  return {L::method...};
}

constexpr auto all_entries = entries(Laws{});
constexpr auto all_methods = methods(Laws{});

Law checked(const Entry& entry, std::span<const double> values, const std::string& where) {
  for (std::size_t i = 0; i < values.size(); ++i)
    require_allowed(entry.method.parameters[i], values[i], fmt::format("{}.{}", where, entry.method.parameters[i].key));
  try {
    return entry.make(values);
  } catch (const Error& e) {
    throw Error(e.kind(), where + "." + e.where(), e.problem(), e.remedy());
  }
}

}  // namespace

std::span<const Method> law_catalogue() { return all_methods; }

Law make_law(std::string_view name, std::span<const double> values, const std::string& where) {
  std::vector<std::string_view> known;
  for (const Entry& entry : all_entries) {
    if (entry.method.name == name) return checked(entry, values, where);
    known.push_back(entry.method.name);
  }
  throw input_error(where, fmt::format("there is no law \"{}\"", name),
                    fmt::format("one of {}", fmt::join(known, ", ")));
}

std::string_view law_name(const Law& law) {
  return std::visit([](const auto& l) { return l.method.name; }, law);
}
double initial_stiffness(const Law& law) {
  return std::visit([](const auto& l) { return initial_stiffness(l); }, law);
}
double yield_deformation(const Law& law) {
  return std::visit([](const auto& l) { return yield_deformation(l); }, law);
}

}  // namespace pilotis
