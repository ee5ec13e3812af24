#include "core/motion/processing/taper.hpp"

#include <fmt/format.h>

#include <cmath>
#include <numbers>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr std::array<Parameter, 3> parameters{{
    {.key = "start",
     .dimension = Dimension::time,
     .meaning = "length of the taper at the start",
     .otherwise = 0,
     .least = 0},
    {.key = "end",
     .dimension = Dimension::time,
     .meaning = "length of the taper at the end",
     .otherwise = 0,
     .least = 0},
    {.key = "fraction",
     .meaning = "length of the taper at each end over that of the record, instead of start and end",
     .otherwise = 0,
     .least = 0,
     .most = 0.5},
}};

double weight(double time, double length) {
  return time < length ? (1 - std::cos(std::numbers::pi * time / length)) / 2 : 1;
}

}  // namespace

const Method CosineTaper::method{"taper", "brings the ends to zero with half a cosine wave", parameters};

CosineTaper CosineTaper::make(std::span<const double> values) {
  const CosineTaper step{values[0], values[1], values[2]};
  const bool times = step.start > 0 || step.end > 0;
  if (times == (step.fraction > 0))
    throw input_error("", times ? "found both times and a fraction" : "found neither times nor a fraction",
                      "give start and end (s), or fraction, greater than 0");
  return step;
}

Processed CosineTaper::applied(const Accelerogram& record) const {
  const double length = record.step * static_cast<double>(record.samples.size() - 1);
  const double first = fraction > 0 ? fraction * length : start, last = fraction > 0 ? fraction * length : end;
  if (first + last > length)
    throw input_error("", fmt::format("found tapers of {:g} s and {:g} s for a record of {:g} s", first, last, length),
                      "they must not overlap");
  Processed out{record, fmt::format("cosine, {:g} s at the start, {:g} s at the end", first, last)};
  for (std::size_t i = 0; i < record.samples.size(); ++i) {
    const double time = record.step * static_cast<double>(i);
    const double left = record.step * static_cast<double>(record.samples.size() - 1 - i);
    out.record.samples[i] *= weight(time, first) * weight(left, last);
  }
  return out;
}

}  // namespace pilotis
