#include "core/motion/synthetic/registry.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <cmath>
#include <vector>

#include "core/error.hpp"
#include "core/motion/synthetic/kanai_tajimi.hpp"

namespace pilotis {

namespace {

struct Entry {
  Method method;
  Accelerogram (*make)(std::span<const double>, const SyntheticGrid&, const std::string&);
};

template <class M>
Accelerogram made_by(std::span<const double> values, const SyntheticGrid& grid, const std::string& where) {
  return made(M::make(values), grid, where);
}

template <class M>
Entry entry() {
  return {M::method, &made_by<M>};
}

const std::vector<Entry>& entries() {
  static const std::vector<Entry> all{entry<KanaiTajimi>()};
  return all;
}

void require_grid(const SyntheticGrid& grid, const std::string& where) {
  constexpr double most_samples = 1e7;
  if (!std::isfinite(grid.step) || grid.step <= 0)
    throw input_error(where + ".step", fmt::format("found {} s", grid.step), "it must be greater than 0 s");
  const double steps = grid.duration / grid.step;
  if (!std::isfinite(steps) || steps < 2 || steps > most_samples)
    throw input_error(where + ".duration", fmt::format("found {} s", grid.duration),
                      fmt::format("it must be 2 to {:.0e} steps of {} s", most_samples, grid.step));
  if (std::abs(steps - std::round(steps)) > 1e-6)
    throw input_error(where + ".duration", fmt::format("found {} s", grid.duration),
                      fmt::format("it must be a whole number of steps of {} s", grid.step));
}

void require_values(const Method& method, std::span<const double> values, const std::string& where) {
  if (values.size() != method.parameters.size())
    throw input_error(where, fmt::format("found {} values", values.size()),
                      fmt::format("{} takes {}", method.name, method.parameters.size()));
  for (std::size_t i = 0; i < values.size(); ++i)
    require_allowed(method.parameters[i], values[i], fmt::format("{}.{}", where, method.parameters[i].key));
}

}  // namespace

std::span<const Method> synthetic_catalogue() {
  static const std::vector<Method> methods = [] {
    std::vector<Method> list;
    for (const Entry& entry : entries()) list.push_back(entry.method);
    return list;
  }();
  return methods;
}

Accelerogram make_synthetic(std::string_view name, std::span<const double> values, const SyntheticGrid& grid,
                            const std::string& where) {
  std::vector<std::string_view> known;
  for (const Entry& entry : entries()) {
    known.push_back(entry.method.name);
    if (entry.method.name != name) continue;
    require_grid(grid, where);
    require_values(entry.method, values, where);
    return entry.make(values, grid, where);
  }
  throw input_error(where, fmt::format("there is no synthetic motion \"{}\"", name),
                    fmt::format("one of {}", fmt::join(known, ", ")));
}

}  // namespace pilotis
