// Viscous damping of the whole building, added to what dashpots already put into C.
#pragma once

#include "core/building/stick.hpp"
#include "core/system/system.hpp"

namespace pilotis {

// `elastic` is K0, the initial elastic stiffness without P-Delta: Rayleigh damping is built on it. Modal damping takes
// the modes of the building as it stands, P-Delta (already in the system) included. Throws Error (input), see
// assemble().
void add_damping(const Damping& damping, const Band& elastic, System& system);

}  // namespace pilotis
