// What every law has. A law is one force-deformation rule with memory; one header each, all in the same order:
//
//   struct Name {
//     static constexpr Method method;                     // name, summary, parameters as a study writes them
//     <numbers>;                                          // immutable once made, SI
//     template <class R> struct Memory { R ...; };        // what the rule remembers; zero is the virgin state
//     static Name make(std::span<const double> values);   // in the order of method.parameters; already range-checked
//     std::array<double, N> values() const;                // the same numbers back, to show them
//   };
//   reply(law, deformation, rate, committed memory, trial memory&) -> Reply   // pure; trial is what would be
//   remembered initial_stiffness(law)                                 // N/m, tangent of the virgin state
//   yield_deformation(law)                                 // m; 0 when the rule does not yield
//   stored_energy(law, memory, deformation)                // J, recoverable
//   dissipated_energy(law, before, after)                  // J, lost between two committed memories, >= 0
//
// All of it is written over the lane scalar R of core/lanes/lane.hpp and selects instead of branching on values.
#pragma once

#include <span>

#include "core/lanes/lane.hpp"
#include "core/parameter.hpp"

namespace pilotis {

// What a law answers to a deformation.
template <class R>
struct Reply {
  R force;    // N, positive when it resists a positive deformation
  R tangent;  // N/m, d force / d deformation along the path taken
};

}  // namespace pilotis
