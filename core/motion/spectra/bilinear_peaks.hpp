// The peaks of many bilinear oscillators over one ground: the flat function under every inelastic spectrum.
//
//   m u'' + c u' + f(u) = -m a_g,  f the law of core/laws/bilinear.hpp: stiffness k, yield f_y, post-yield ratio r
//   omega^2 = k / m, zeta = c / (2 m omega), both of the elastic state
//   yield acceleration a_y = f_y / m, yield displacement u_y = a_y / omega^2, ductility mu = max |u| / u_y
// Source: Chopra, "Dynamics of Structures", ch. 7 (from memory).
//
// How a step is taken: bilinear_kernel.hpp. It errs by about (omega h)^2 where the spring slips, so a period gets at
// least 200 steps: against a march with steps 40 times finer, ductilities are within (2 pi / 200)^2 = 0.1 %
// (tests/core/motion).
//
// After the record the ground stays at rest and the march goes on until two reversals have passed and what is left of
// the motion cannot yield any more, 100 periods at most.
//
// Reentrant; allocates one bundle per eight oscillators and a block of ground. Same bits in any company, on any thread
// and with any instruction set.
#pragma once

#include <span>

#include "core/lanes/instruction_set.hpp"
#include "core/motion/spectra/oscillator.hpp"

namespace pilotis {

struct BilinearOscillator {
  double period;              // s, > 0, of the elastic state; at least the record's step / 100
  double damping_ratio;       // -, >= 0, < 1
  double yield_acceleration;  // m/s2, > 0: yield force over mass; the yield coefficient times g
};

struct BilinearPeak {
  double ductility;     // -
  double displacement;  // m, the extreme of larger magnitude, with its sign
  double residual;      // m, with its sign: where it comes to rest
};

constexpr StepRule bilinear_rule{200, false};

// post_yield_ratio r: 0 (elastoplastic) to below 1. peaks: as many as oscillators, in their order; NaN where the
// response overflows. Throws Error (input) at `where` when something is not as described.
void bilinear_peaks(const Ground& ground, double post_yield_ratio, std::span<const BilinearOscillator> oscillators,
                    std::span<BilinearPeak> peaks, const std::string& where, const StepRule& rule = bilinear_rule,
                    InstructionSet set = chosen_instruction_set());

}  // namespace pilotis
