#include "core/motion/processing/trim.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"
#include "core/motion/measures/intensity.hpp"

namespace pilotis {

namespace {

constexpr std::array<Parameter, 4> parameters{{
    {.key = "from",
     .meaning = "share of the Arias intensity at the start of the window",
     .otherwise = 0.05,
     .least = 0,
     .most = 1},
    {.key = "to",
     .meaning = "share of the Arias intensity at the end of the window",
     .otherwise = 0.95,
     .least = 0,
     .most = 1},
    {.key = "lead", .dimension = Dimension::time, .meaning = "time kept before the window", .otherwise = 0, .least = 0},
    {.key = "trail", .dimension = Dimension::time, .meaning = "time kept after the window", .otherwise = 0, .least = 0},
}};

}  // namespace

const Method TrimToArias::method{"trim", "keeps the part between two shares of the Arias intensity", parameters};

TrimToArias TrimToArias::make(std::span<const double> values) {
  const TrimToArias step{values[0], values[1], values[2], values[3]};
  if (step.from >= step.to)
    throw input_error("from", fmt::format("found {:g}", step.from),
                      fmt::format("it must be less than to, {:g}", step.to));
  return step;
}

Processed TrimToArias::applied(const Accelerogram& record) const {
  if (arias_intensity(record) == 0)
    throw input_error("", "found a record of zeros", "it has no part of significant shaking");
  const TimeWindow window = arias_window(record, from, to);
  const double last_place = static_cast<double>(record.samples.size() - 1);
  // 1e-9 of a step: the last bit of a quotient must not keep a sample more.
  const double first = std::floor((window.begin - lead - record.first_sample_at) / record.step + 1e-9);
  const double last = std::ceil((window.end + trail - record.first_sample_at) / record.step - 1e-9);
  const auto begin = static_cast<std::size_t>(std::clamp(first, 0.0, last_place - 1));
  const auto end = static_cast<std::size_t>(std::clamp(last, static_cast<double>(begin + 1), last_place));
  Processed out{{record.step, begin == 0 ? record.first_sample_at : 0, {}}, ""};
  out.record.samples.assign(record.samples.begin() + static_cast<std::ptrdiff_t>(begin),
                            record.samples.begin() + static_cast<std::ptrdiff_t>(end) + 1);
  const auto time = [&](std::size_t i) { return record.first_sample_at + record.step * static_cast<double>(i); };
  out.done = fmt::format(
      "{:g} % to {:g} % of the Arias intensity, from {:g} to {:g} s, with {:g} s before and {:g} s after: kept {:g} to "
      "{:g} s of {:g} s; first sample {:.4g} m/s2, last {:.4g} m/s2",
      100 * from, 100 * to, window.begin, window.end, lead, trail, time(begin), time(end), record.duration(),
      out.record.samples.front(), out.record.samples.back());
  return out;
}

}  // namespace pilotis
