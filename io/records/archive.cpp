#include "io/records/archive.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "core/error.hpp"
#include "core/units/units.hpp"
#include "io/records/components.hpp"
#include "io/records/heading.hpp"
#include "io/records/number.hpp"
#include "io/records/text.hpp"

namespace pilotis {

namespace {

constexpr double rounding = 0.01, refused = 0.1;

void check_peak(const ReadComponent& read, const std::string& unit, const std::string& where,
                std::vector<std::string>& notes) {
  if (!read.peak) return;
  const double stated = read.peak->value, found = read.peak_found.value_or(largest_of(read.values));
  const double apart = std::abs(std::abs(stated) - std::abs(found)) - read.peak->last_digit;
  const double size = std::max(std::abs(stated), std::abs(found));
  const std::string both =
      fmt::format("the header states a peak of {:.6g} {}, the samples have {:.6g} {}", stated, unit, found, unit);
  if (apart > refused * size)
    throw input_error(at_line(where, read.peak->line), both,
                      "the numbers are not what the header describes: is the file damaged or cut?");
  if (apart > rounding * size)
    notes.push_back(both);
  else if (stated < 0 && found > 0)
    notes.push_back("the header states the peak with the opposite sign");
}

double positive(std::string_view token, int line, const char* what, const std::string& file) {
  const std::string where = at_line(file, line);
  const double value = require_number(stripped(token), where);
  if (value > 0) return value;
  throw input_error(where, fmt::format("found {} as the {}", in_quotes(token), what), "it must be greater than 0");
}

}  // namespace

double largest_of(const std::vector<double>& values) {
  double peak = 0;
  for (double value : values)
    if (std::abs(value) > std::abs(peak)) peak = value;
  return peak;
}

std::optional<StatedPeak> stated_peak(std::string_view token, int line) {
  const ParsedNumber parsed = parse_number(token);
  if (parsed.kind != ParsedNumber::Kind::number) return std::nullopt;
  return StatedPeak{parsed.value, std::pow(10.0, -printed_precision(token).decimals), line};
}

RecordComponent finished(ReadComponent read, const RecordHints& hints, const std::string& where) {
  RecordComponent component;
  component.name = std::move(read.name);
  component.channel = read.channel;
  component.azimuth = azimuth_of_name(component.name);
  component.unit = agreed_unit(read.says, hints, where);
  component.stated_samples = read.stated_samples;
  Accelerogram& record = component.record;
  record.step = agreed_step(read.says, hints, where);
  if (hints.first_sample_at)
    record.first_sample_at = agreed_first_sample({}, hints, record.step, where, component.notes);
  check_peak(read, component.unit, where, component.notes);
  record.samples = std::move(read.values);
  const double factor = si_factor(component.unit, Dimension::acceleration, where);
  for (double& sample : record.samples) sample *= factor;
  return component;
}

StatedUnit unit_stated(std::string_view text, int line) { return {known_unit(stripped(text)), line}; }

StatedTime step_stated(std::string_view token, int line, const std::string& file) {
  return {positive(token, line, "time step", file), line};
}

StatedTime rate_stated(std::string_view samples_per_second, int line, const std::string& file) {
  return {1 / positive(samples_per_second, line, "number of samples a second", file), line};
}

void refuse_quantity(const std::string& where, const std::string& quantity) {
  throw input_error(where, fmt::format("this file holds {}", quantity),
                    "the acceleration of the same record is needed");
}

}  // namespace pilotis
