// A target spectrum: the spectral accelerations a suite of motions is compared with or fitted to.
#pragma once

#include <functional>
#include <string>
#include <vector>

namespace pilotis {

class TargetSpectrum {
 public:
  // `ordinate` gives the spectral acceleration (m/s2) at a period (s) from `shortest` to `longest`.
  TargetSpectrum(std::string description, double damping, double shortest, double longest,
                 std::function<double(double)> ordinate);

  // One line: the code with its edition and clause, and every number it was made from.
  const std::string& description() const { return description_; }
  double damping() const { return damping_; }    // fraction of critical
  double shortest() const { return shortest_; }  // s, may be 0
  double longest() const { return longest_; }    // s, may be infinite

  // Spectral acceleration, m/s2. Throws Error (input) when it is not defined at this period (s).
  double acceleration(double period) const;
  // Spectral displacement, m: acceleration (period / (2 pi))^2.
  double displacement(double period) const;
  bool defined_at(double period) const { return period >= shortest_ && period <= longest_; }

 private:
  std::string description_;
  double damping_, shortest_, longest_;
  std::function<double(double)> ordinate_;
};

}  // namespace pilotis
