// Random numbers that are the same on every machine: the generator's raw output is fixed by the C++ standard, the
// distributions of <random> are not, so the step to normal numbers is ours.
#pragma once

#include <cstdint>
#include <random>

namespace pilotis {

// Standard normal numbers: std::mt19937_64 seeded with one number; its top 53 bits give uniform numbers in (0, 1]; each
// pair u1, u2 of them gives sqrt(-2 ln u1) cos(2 pi u2), then sqrt(-2 ln u1) sin(2 pi u2) (Box & Muller 1958, Annals of
// Mathematical Statistics 29, 610). The mathematics library may differ in the last bit between machines.
class NormalNumbers {
 public:
  explicit NormalNumbers(std::uint64_t seed) : generator_(seed) {}
  double next();
  double uniform();  // in (0, 1]

 private:
  std::mt19937_64 generator_;
  double spare_ = 0;
  bool has_spare_ = false;
};

}  // namespace pilotis
