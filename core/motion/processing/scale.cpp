#include "core/motion/processing/scale.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <cmath>
#include <vector>

#include "core/error.hpp"
#include "core/motion/measures/registry.hpp"

namespace pilotis {

namespace {

const std::vector<const Measure*>& scalable() {
  static const std::vector<const Measure*> list = [] {
    std::vector<const Measure*> measures;
    for (const Measure& measure : measure_catalogue())
      if (measure.power > 0 && measure.of_record != nullptr) measures.push_back(&measure);
    return measures;
  }();
  return list;
}

std::span<const Parameter> parameters() {
  static const std::vector<Parameter> list = [] {
    std::vector<Parameter> keys{{.key = "factor", .meaning = "the factor", .otherwise = 0, .least = 0}};
    for (const Measure* measure : scalable())
      keys.push_back({.key = measure->name,
                      .dimension = measure->dimension,
                      .meaning = measure->long_name,
                      .otherwise = 0,
                      .least = 0});
    return keys;
  }();
  return list;
}

}  // namespace

const Method ScaleTo::method{"scale", "multiplies by a factor, or so that one measure has a stated value",
                             parameters()};

ScaleTo ScaleTo::make(std::span<const double> values) {
  std::vector<std::string_view> known, given;
  ScaleTo step;
  for (std::size_t i = 0; i < values.size(); ++i) {
    known.push_back(parameters()[i].key);
    if (values[i] <= 0) continue;
    given.push_back(parameters()[i].key);
    step = {i, values[i]};
  }
  if (given.size() != 1)
    throw input_error("",
                      given.empty() ? "found nothing to scale to" : fmt::format("found {}", fmt::join(given, " and ")),
                      fmt::format("give exactly one, greater than 0: {}", fmt::join(known, ", ")));
  return step;
}

Processed ScaleTo::applied(const Accelerogram& record) const {
  double factor = value;
  std::string reason;
  if (key > 0) {
    const Measure& measure = *scalable()[key - 1];
    const double found = measure.of_record(record);
    const auto unit = si_unit(measure.dimension);
    if (!(found > 0))
      throw input_error(std::string(measure.name),
                        fmt::format("the record's {} is {:g} {}", measure.long_name, found, unit),
                        "it cannot be scaled to another value");
    factor = std::pow(value / found, 1.0 / measure.power);
    reason = fmt::format(": {} from {:.6g} to {:.6g} {}", measure.long_name, found, value, unit);
  }
  Processed out{record, fmt::format("factor {:.6g}{}", factor, reason)};
  for (double& sample : out.record.samples) sample *= factor;
  return out;
}

}  // namespace pilotis
