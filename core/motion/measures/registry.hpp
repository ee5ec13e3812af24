// Every intensity measure, listed once. Tables, result files, help and the step `scale` iterate over this list.
#pragma once

#include <span>
#include <string>
#include <string_view>

#include "core/motion/accelerogram.hpp"
#include "core/motion/measures/spectral.hpp"
#include "core/units/units.hpp"

namespace pilotis {

struct Measure {
  std::string_view name;       // as in studies and result files
  Dimension dimension;         // values are SI
  std::string_view long_name;  // one line
  std::string_view source;     // who defined it, and where
  int power;                   // a motion k times as large has a measure k^power times as large; -1: no power of k
  // One of the two is there.
  double (*of_record)(const Accelerogram&) = nullptr;
  double (*of_spectrum)(const PseudoVelocities&) = nullptr;
};

std::span<const Measure> measure_catalogue();

// Throws Error (input) at `where` when there is no such measure, naming those there are.
const Measure& measure_named(std::string_view name, const std::string& where);

}  // namespace pilotis
