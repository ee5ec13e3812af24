#include "core/motion/synthetic/registry.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <cmath>
#include <vector>

#include "core/error.hpp"
#include "core/motion/synthetic/clough_penzien.hpp"
#include "core/motion/synthetic/curve.hpp"
#include "core/motion/synthetic/harmonic.hpp"
#include "core/motion/synthetic/kanai_tajimi.hpp"
#include "core/motion/synthetic/near_fault_pulse.hpp"
#include "core/motion/synthetic/pulse.hpp"
#include "core/motion/synthetic/ricker.hpp"
#include "core/motion/synthetic/spectrum_compatible.hpp"
#include "core/motion/synthetic/stochastic.hpp"
#include "core/motion/synthetic/sweep.hpp"
#include "core/motion/synthetic/white_noise.hpp"

namespace pilotis {

namespace {

struct Entry {
  SyntheticKind kind;
  MadeMotion (*make)(const SyntheticInput&);
};

const std::vector<Entry>& entries() {
  static const std::vector<Entry> all{{kanai_tajimi::kind, kanai_tajimi::make},
                                      {clough_penzien::kind, clough_penzien::make},
                                      {white_noise::kind, white_noise::make},
                                      {spectrum_compatible::kind, spectrum_compatible::make},
                                      {stochastic::kind, stochastic::make},
                                      {near_fault_pulse::kind, near_fault_pulse::make},
                                      {ricker::kind, ricker::make},
                                      {harmonic::kind, harmonic::make},
                                      {sweep::kind, sweep::make},
                                      {pulse::kind, pulse::make}};
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

void require_curves(const SyntheticKind& kind, std::span<const Curve> curves, const std::string& where) {
  if (curves.size() != kind.curves.size())
    throw input_error(where, fmt::format("found {} tables", curves.size()),
                      fmt::format("{} takes {}", kind.method.name, kind.curves.size()));
  for (std::size_t i = 0; i < curves.size(); ++i)
    require_allowed(kind.curves[i], curves[i], fmt::format("{}.{}", where, kind.curves[i].key));
}

// To a millionth, exactly as a text with six decimals is read back.
void round_samples(Accelerogram& record) {
  for (double& sample : record.samples) sample = std::round(sample * 1e6) / 1e6;
}

}  // namespace

std::span<const SyntheticKind> synthetic_catalogue() {
  static const std::vector<SyntheticKind> kinds = [] {
    std::vector<SyntheticKind> list;
    for (const Entry& entry : entries()) list.push_back(entry.kind);
    return list;
  }();
  return kinds;
}

MadeMotion make_synthetic(std::string_view name, std::span<const double> values, std::span<const Curve> curves,
                          const SyntheticGrid& grid, const std::string& where) {
  std::vector<std::string_view> known;
  for (const Entry& entry : entries()) {
    known.push_back(entry.kind.method.name);
    if (entry.kind.method.name != name) continue;
    require_grid(grid, where);
    require_values(entry.kind.method, values, where);
    require_curves(entry.kind, curves, where);
    MadeMotion motion = entry.make({entry.kind, values, curves, grid, where});
    round_samples(motion.record);
    return motion;
  }
  throw input_error(where, fmt::format("there is no synthetic motion \"{}\"", name),
                    fmt::format("one of {}", fmt::join(known, ", ")));
}

}  // namespace pilotis
