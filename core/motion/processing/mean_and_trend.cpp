#include "core/motion/processing/mean_and_trend.hpp"

#include <fmt/format.h>

#include <numeric>

namespace pilotis {

namespace {

double mean(const std::vector<double>& samples) {
  return std::accumulate(samples.begin(), samples.end(), 0.0) / static_cast<double>(samples.size());
}

}  // namespace

const Method RemoveMean::method{"remove_mean", "subtracts the mean of the samples", {}};
const Method RemoveTrend::method{"remove_trend", "subtracts the least-squares straight line through the samples", {}};

RemoveMean RemoveMean::make(std::span<const double>) { return {}; }
RemoveTrend RemoveTrend::make(std::span<const double>) { return {}; }

Processed RemoveMean::applied(const Accelerogram& record) const {
  Processed out{record, ""};
  const double level = mean(record.samples);
  for (double& sample : out.record.samples) sample -= level;
  out.done = fmt::format("{:.6g} m/s2 subtracted", level);
  return out;
}

Processed RemoveTrend::applied(const Accelerogram& record) const {
  Processed out{record, ""};
  // Over s = place - middle, for which sum(s) = 0: slope = sum(s a) / sum(s^2).
  const double middle = static_cast<double>(record.samples.size() - 1) / 2;
  const double level = mean(record.samples);
  double product = 0, square = 0;
  for (std::size_t i = 0; i < record.samples.size(); ++i) {
    const double s = static_cast<double>(i) - middle;
    product += s * (record.samples[i] - level);
    square += s * s;
  }
  const double slope = product / square;
  for (std::size_t i = 0; i < record.samples.size(); ++i)
    out.record.samples[i] -= level + slope * (static_cast<double>(i) - middle);
  out.done = fmt::format("line from {:.6g} to {:.6g} m/s2 subtracted", level - slope * middle, level + slope * middle);
  return out;
}

}  // namespace pilotis
