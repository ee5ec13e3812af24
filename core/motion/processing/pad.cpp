#include "core/motion/processing/pad.hpp"

#include <fmt/format.h>

#include <cmath>

#include "core/error.hpp"

namespace pilotis {

namespace {

constexpr double most_samples = 1e8;  // a slip in the unit must not fill the memory

constexpr std::array<Parameter, 4> parameters{{
    {.key = "before", .dimension = Dimension::time, .meaning = "zeros before the record", .otherwise = 0, .least = 0},
    {.key = "after", .dimension = Dimension::time, .meaning = "zeros after the record", .otherwise = 0, .least = 0},
    {.key = "corner",
     .dimension = Dimension::frequency,
     .meaning = "low corner of the acausal filter to come, instead of before and after: 1.5 order / corner at each end",
     .otherwise = 0,
     .least = 0},
    {.key = "order", .meaning = "order of that filter", .otherwise = 4, .least = 1, .most = 10, .whole = true},
}};

std::size_t whole_steps(double length, double step) {
  const double steps = std::ceil(length / step * (1 - 1e-12));  // no extra step for the last bit of the quotient
  if (steps > most_samples)
    throw input_error("", fmt::format("found {:g} s of zeros, {:.3g} steps of {:g} s", length, steps, step),
                      fmt::format("at most {:.0e} steps", most_samples));
  return static_cast<std::size_t>(steps);
}

}  // namespace

double filter_pad_length(int order, double corner) { return 1.5 * order / corner; }

const Method ZeroPad::method{"pad", "adds zeros before and after the record", parameters};

ZeroPad ZeroPad::make(std::span<const double> values) {
  const ZeroPad step{values[0], values[1], values[2], static_cast<int>(values[3])};
  const bool times = step.before > 0 || step.after > 0;
  if (times == (step.corner > 0))
    throw input_error("", times ? "found both times and a corner" : "found neither times nor a corner",
                      "give before and after (s), or the corner (Hz) of the filter to come, greater than 0");
  return step;
}

Processed ZeroPad::applied(const Accelerogram& record) const {
  const double by_rule = corner > 0 ? filter_pad_length(order, corner) : 0;
  const std::size_t head = whole_steps(corner > 0 ? by_rule : before, record.step);
  const std::size_t tail = whole_steps(corner > 0 ? by_rule : after, record.step);
  Processed out{record, ""};
  std::vector<double>& samples = out.record.samples;
  samples.insert(samples.begin(), head, 0.0);
  samples.insert(samples.end(), tail, 0.0);
  out.done = fmt::format("{:g} s of zeros before, {:g} s after", record.step * static_cast<double>(head),
                         record.step * static_cast<double>(tail));
  if (corner > 0) out.done += fmt::format(" (1.5 n / f_c = {:g} s, n = {}, f_c = {:g} Hz)", by_rule, order, corner);
  return out;
}

}  // namespace pilotis
