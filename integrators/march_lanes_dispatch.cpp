#include "integrators/march_lanes.hpp"

namespace pilotis {

MarchLanes& march_lanes(InstructionSet set) {
  static constexpr auto kernels = PILOTIS_KERNELS(march_lanes);
  return *kernels[static_cast<std::size_t>(set)];
}

}  // namespace pilotis
