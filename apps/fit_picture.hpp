// Spectra before and after a fit with the target and the period range, as an SVG file.
#pragma once

#include <string>
#include <vector>

namespace pilotis {

enum class PictureLine { target, before, after };

struct PictureCurve {
  std::string name;
  PictureLine line = PictureLine::target;
  std::vector<double> accelerations;  // m/s2, [period]; not drawn where not a number or not greater than 0
};

struct FitPicture {
  std::string title, subtitle;
  double from = 0, to = 0;                // s, the range of the fit, shaded
  std::vector<double> periods;            // s, > 0, rising
  std::vector<std::vector<double>> thin;  // m/s2, [motion][period]: thin lines behind
  std::vector<PictureCurve> curves;
};

// Both axes logarithmic: period in s, pseudo-acceleration in g.
std::string svg_of(const FitPicture& picture);

}  // namespace pilotis
