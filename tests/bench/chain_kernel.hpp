// The general implicit step against one written by hand for a chain of bilinear stories, both in lanes and both keeping
// the largest drift of every story: what the generality of rows, groups and bands costs.
#pragma once

#include <vector>

#include "core/lanes/instruction_set.hpp"
#include "core/system/system.hpp"

namespace pilotis::bench {

// Runs that differ by a factor on one ground motion; average acceleration.
struct ChainJob {
  const System* system = nullptr;               // a stick of bilinear stories with Rayleigh damping, without P-Delta
  const std::vector<double>* ground = nullptr;  // m/s2, at every step
  double dt = 0;                                // s
  double tolerance = 0;                         // N
  std::vector<double> factors;                  // one a lane
  std::vector<double> peaks;                    // out: m, [story][lane]
  long iterations = 0;                          // out: of Newton, all steps
};

}  // namespace pilotis::bench

namespace pilotis {
PILOTIS_DECLARE_KERNELS(void chain_march(bench::ChainJob& job))
PILOTIS_DECLARE_KERNELS(void general_march(bench::ChainJob& job))
}  // namespace pilotis
