#include "core/lanes/instruction_set.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <algorithm>
#include <cstdlib>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr const char* variable = "PILOTIS_INSTRUCTION_SET";

std::vector<InstructionSet> found() {
  std::vector<InstructionSet> sets{InstructionSet::baseline};
#if defined(__x86_64__) && !defined(PILOTIS_BASELINE_ALONE)
  if (__builtin_cpu_supports("x86-64-v2")) sets.push_back(InstructionSet::x86_64_v2);
  if (__builtin_cpu_supports("x86-64-v3")) sets.push_back(InstructionSet::x86_64_v3);
  if (__builtin_cpu_supports("x86-64-v4")) sets.push_back(InstructionSet::x86_64_v4);
#endif
  return sets;
}

InstructionSet named(std::string_view name) {
  std::vector<std::string_view> names;
  for (InstructionSet set : instruction_sets()) {
    if (name_of(set) == name) return set;
    names.push_back(name_of(set));
  }
  throw input_error(variable, fmt::format("found \"{}\"", name),
                    fmt::format("this machine can run {}", fmt::join(names, ", ")));
}

}  // namespace

const std::vector<InstructionSet>& instruction_sets() {
  static const std::vector<InstructionSet> sets = found();
  return sets;
}

InstructionSet chosen_instruction_set() {
  static const char* const wanted = std::getenv(variable);
  return wanted != nullptr ? named(wanted) : instruction_sets().back();
}

std::string_view name_of(InstructionSet set) {
  constexpr std::array names{"baseline", "x86-64-v2", "x86-64-v3", "x86-64-v4"};
  return names[static_cast<std::size_t>(set)];
}

int lanes_of(InstructionSet set) {
  constexpr std::array lanes{2, 2, 4, 8};
  return lanes[static_cast<std::size_t>(set)];
}

}  // namespace pilotis
