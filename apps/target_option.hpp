// The target spectrum of a command: one of core/motion/target by name with its numbers as options, or a table from a
// file.
#pragma once

#include <CLI/CLI.hpp>
#include <map>
#include <string>

#include "core/motion/synthetic/kind.hpp"
#include "core/motion/target/target.hpp"
#include "core/parameter.hpp"

namespace pilotis {

struct TypedTarget {
  std::string name;                           // of target_catalogue()
  std::string file;                           // or a table; one of the two
  std::map<std::string, std::string> values;  // by key of a parameter of any target, as typed
};

// --target, --target-file and an option for every parameter of every target but its damping ratio, which is the
// command's own --damping.
void add_target_options(CLI::App& command, TypedTarget& typed);

// The numbers of one named target, SI, in the order of its parameters. Throws Error (input) where one is missing or no
// such number.
std::vector<double> target_values(const Method& target, const TypedTarget& typed, double damping,
                                  std::string_view command);

// `damping`: fraction of critical, of the spectrum that is wanted. Throws Error (input) when neither or both are given,
// a number is missing, or a code has its spectrum for another damping only. Numbers of other targets are left alone: a
// code that is checked may need them.
TargetSpectrum target_of(const TypedTarget& typed, double damping, std::string_view command);

// The options that give the same target again, with every number written out; without --damping.
std::string target_text(const TypedTarget& typed, double damping, std::string_view command);

// What the file of a table holds, for help and read_curve.
CurveParameter target_table_columns();

}  // namespace pilotis
