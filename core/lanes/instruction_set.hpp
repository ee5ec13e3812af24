// Which instruction set the hot kernels run with. They are compiled once per set (core/lanes/kernels.cmake) and chosen
// once, by what the processor and the operating system can do. Levels of the x86-64 psABI; the baseline runs anywhere.
#pragma once

#include <array>
#include <string_view>
#include <vector>

namespace pilotis {

// PILOTIS_BASELINE_ALONE: a build whose kernels are compiled for the baseline only.
#if defined(__x86_64__) && !defined(PILOTIS_BASELINE_ALONE)
enum class InstructionSet { baseline, x86_64_v2, x86_64_v3, x86_64_v4 };
// Declares a kernel in the namespace of every set, and lists all of them in the order of the enum.
#define PILOTIS_DECLARE_KERNELS(...) \
  namespace baseline {               \
  __VA_ARGS__;                       \
  }                                  \
  namespace x86_64_v2 {              \
  __VA_ARGS__;                       \
  }                                  \
  namespace x86_64_v3 {              \
  __VA_ARGS__;                       \
  }                                  \
  namespace x86_64_v4 {              \
  __VA_ARGS__;                       \
  }
#define PILOTIS_KERNELS(name) \
  std::array { &baseline::name, &x86_64_v2::name, &x86_64_v3::name, &x86_64_v4::name }
#else
enum class InstructionSet { baseline };
#define PILOTIS_DECLARE_KERNELS(...) \
  namespace baseline {               \
  __VA_ARGS__;                       \
  }
#define PILOTIS_KERNELS(name) \
  std::array { &baseline::name }
#endif

// Those this machine can run, the baseline first, the best last. Never empty.
const std::vector<InstructionSet>& instruction_sets();

// The best of them; or the one that the environment variable PILOTIS_INSTRUCTION_SET names (for comparisons), where
// this machine has it: a name it does not know or cannot run is an Error (input).
InstructionSet chosen_instruction_set();

std::string_view name_of(InstructionSet set);  // "baseline", "x86-64-v3"
int lanes_of(InstructionSet set);              // doubles in a pack: 2, 4 or 8

}  // namespace pilotis
