// Many marches of one system by a scheme of the Newmark family, in packs of lanes: one lane, one run. The kernel is
// compiled for every instruction set (core/lanes/instruction_set.hpp); a run gives the same bits in any of them, in any
// lane and any company.
#pragma once

#include <atomic>
#include <span>

#include "core/lanes/instruction_set.hpp"
#include "integrators/implicit_step.hpp"
#include "integrators/watched_march.hpp"

namespace pilotis {

// Marches tasks[i] into out[i]; both of the same length. False when `stop` was set meanwhile: what is in hand is then
// given up and `out` is not whole. `ended` (may be null) counts marches that have come to an end.
using MarchLanes = bool(const System& system, const ImplicitCoefficients& coefficients, const BatchSettings& settings,
                        std::span<const MarchTask> tasks, Marched* out, const std::atomic<bool>* stop,
                        std::atomic<long>* ended);

PILOTIS_DECLARE_KERNELS(MarchLanes march_lanes)

MarchLanes& march_lanes(InstructionSet set);

}  // namespace pilotis
