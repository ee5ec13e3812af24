// How the tests of made motions ask for one: by the names of its parameters, the rest as usual.
#pragma once

#include <map>
#include <stdexcept>
#include <string>
#include <vector>

#include "core/motion/synthetic/registry.hpp"

namespace pilotis {

inline const SyntheticKind& kind_named(std::string_view name) {
  for (const SyntheticKind& kind : synthetic_catalogue())
    if (kind.method.name == name) return kind;
  throw std::logic_error("no kind " + std::string(name));
}

// Values that go together: those given, else the usual ones; a required one is twice its least value, or 3.
inline std::vector<double> usual_values(const SyntheticKind& kind, const std::map<std::string, double>& given = {}) {
  std::vector<double> values;
  for (const Parameter& parameter : kind.method.parameters) {
    const double required = parameter.least > 3 ? 2 * parameter.least : 3;
    double value = parameter.otherwise.value_or(required);
    if (parameter.key == "pga" && given.count("arias") + given.count("noise_density") == 0) value = 3;
    const auto found = given.find(std::string(parameter.key));
    values.push_back(found == given.end() ? value : found->second);
  }
  return values;
}

// A flat table where one is required.
inline std::vector<Curve> usual_curves(const SyntheticKind& kind) {
  std::vector<Curve> curves;
  for (const CurveParameter& curve : kind.curves)
    curves.push_back(curve.required ? Curve{{0.1, 0.3, 0.5, 2}, {5, 7, 7, 1.8}} : Curve{});
  return curves;
}

inline MadeMotion made(std::string_view name, const std::map<std::string, double>& given = {},
                       const SyntheticGrid& grid = {1, 0.01, 20}) {
  const SyntheticKind& kind = kind_named(name);
  return make_synthetic(name, usual_values(kind, given), usual_curves(kind), grid, "here");
}

}  // namespace pilotis
