// A 20-story bilinear stick under twice El Centro: what schemes are compared on. Invented building.
#pragma once

#include <fstream>
#include <string>

#include "core/building/stick.hpp"
#include "core/motion/accelerogram.hpp"

namespace pilotis::test {

// 3.5 m and 400 t a story, stiffness and strength falling toward the roof, 3 % hardening; T1 about 2 s. `yields` false:
// the same building with linear springs. Rayleigh damping by its factors, so that an outside solver can take C as it
// stands.
inline Stick twenty_stories(bool yields = true) {
  Stick stick;
  for (int i = 0; i < 20; ++i) {
    const double stiffness = 9e8 - 3e7 * i, yield = 9.5e6 * (1 - 0.04 * i);
    const Law spring = yields ? Law(Bilinear{stiffness, yield, 0.03}) : Law(Linear{stiffness});
    stick.stories.push_back({"", 3.5, 4e5, spring, 0});
  }
  stick.damping = RayleighByFactors{0.2, 0.002};
  return stick;
}

inline std::string el_centro_file() { return std::string(PILOTIS_SHARED) + "/reference/elcentro-1940-ns.txt"; }

// 1559 samples at 0.02 s, the first at 0.02 s, times `unit` (what one g is in the units used); empty without the file.
inline Accelerogram el_centro(double unit) {
  Accelerogram record{0.02, 0.02, {}};
  std::ifstream file(el_centro_file());
  for (std::string line; std::getline(file, line);)
    if (!line.empty() && line[0] != '#') record.samples.push_back(unit * std::stod(line));
  return record;
}

}  // namespace pilotis::test
