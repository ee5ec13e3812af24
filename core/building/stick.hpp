// A building described as a stick: one horizontal freedom per floor, one spring per story. Plain data, SI units.
#pragma once

#include <string>
#include <variant>
#include <vector>

#include "core/laws/registry.hpp"
#include "core/units/units.hpp"

namespace pilotis {

// Story i stands between floor i-1 and floor i and carries floor i's mass on its top.
struct Story {
  std::string label;   // "" or what the user calls it
  double height = 0;   // m, > 0
  double mass = 0;     // kg of the floor on top of the story, > 0
  Law spring;          // story shear against drift
  double dashpot = 0;  // N s/m, c_i of a linear dashpot in the story, >= 0
};

struct NoDamping {};

// C = a0 M + a1 K0 with the ratio met in two modes (counted from 1) of the building without P-Delta; K0 is the initial
// elastic stiffness, without P-Delta. Common practice; Chopra, Dynamics of Structures, ch. 11.
struct RayleighByModes {
  double ratio_first = 0, ratio_second = 0;  // fraction of critical, >= 0
  int first = 1, second = 2;                 // first < second <= number of floors
};

// C = mass_factor M + stiffness_factor K0.
struct RayleighByFactors {
  double mass_factor = 0;       // 1/s
  double stiffness_factor = 0;  // s
};

// C = sum over modes of 2 zeta_j omega_j / M_j (M phi_j)(M phi_j)^T, modes of the building as it stands, P-Delta
// included. One ratio: every mode has it. Several: modes 1, 2, ...; modes beyond the list are undamped.
struct ModalDamping {
  std::vector<double> ratios;  // fraction of critical, >= 0
};

using Damping = std::variant<NoDamping, RayleighByModes, RayleighByFactors, ModalDamping>;

struct Stick {
  std::vector<Story> stories;         // from the ground up, at least one
  Damping damping;                    // added to the stories' dashpots
  bool p_delta = false;               // -P/h in each story, P = gravity times the masses above
  double gravity = standard_gravity;  // m/s2
};

// Throws Error (input) at `where` when a field is out of the ranges above.
void validate(const Stick& stick, const std::string& where);

}  // namespace pilotis
