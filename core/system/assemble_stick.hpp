// A stick as equations of motion.
#pragma once

#include "core/building/stick.hpp"
#include "core/system/system.hpp"

namespace pilotis {

// Freedom i is the displacement of floor i+1 relative to the ground. Story i has one row, x_i - x_(i-1), one element
// (its spring), its dashpot in C, and -P/h in K with P-Delta. The stick has been validated.
// Throws Error (input) when a Rayleigh pair asks for a mode the building lacks or modes of equal frequency.
System assemble(const Stick& stick);

}  // namespace pilotis
