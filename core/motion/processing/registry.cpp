#include "core/motion/processing/registry.hpp"

#include <fmt/format.h>
#include <fmt/ranges.h>

#include <utility>

#include "core/error.hpp"
#include "core/motion/processing/baseline.hpp"
#include "core/motion/processing/filters.hpp"
#include "core/motion/processing/mean_and_trend.hpp"
#include "core/motion/processing/pad.hpp"
#include "core/motion/processing/resample.hpp"
#include "core/motion/processing/scale.hpp"
#include "core/motion/processing/taper.hpp"
#include "core/motion/processing/trim.hpp"

namespace pilotis {

namespace {

struct Entry {
  Method method;
  void (*check)(std::span<const double>);
  Processed (*apply)(std::span<const double>, const Accelerogram&);
};

template <class S>
Entry entry() {
  return {S::method, [](std::span<const double> values) { static_cast<void>(S::make(values)); },
          [](std::span<const double> values, const Accelerogram& record) { return S::make(values).applied(record); }};
}

const std::vector<Entry>& entries() {
  static const std::vector<Entry> all{entry<RemoveMean>(),  entry<RemoveTrend>(), entry<PolynomialBaseline>(),
                                      entry<CosineTaper>(), entry<ZeroPad>(),     entry<Bandpass>(),
                                      entry<Highpass>(),    entry<Lowpass>(),     entry<Resample>(),
                                      entry<TrimToArias>(), entry<ScaleTo>()};
  return all;
}

const Entry& entry_named(std::string_view name, const std::string& where) {
  std::vector<std::string_view> known;
  for (const Entry& entry : entries()) {
    if (entry.method.name == name) return entry;
    known.push_back(entry.method.name);
  }
  throw input_error(where, fmt::format("there is no processing step \"{}\"", name),
                    fmt::format("one of {}", fmt::join(known, ", ")));
}

// Steps name the key at fault; the place of the step goes in front.
template <class F>
auto at_place(const std::string& where, F work) {
  try {
    return work();
  } catch (const Error& e) {
    throw Error(e.kind(), e.where().empty() ? where : where + "." + e.where(), e.problem(), e.remedy());
  }
}

}  // namespace

std::span<const Method> process_catalogue() {
  static const std::vector<Method> methods = [] {
    std::vector<Method> list;
    for (const Entry& entry : entries()) list.push_back(entry.method);
    return list;
  }();
  return methods;
}

ProcessStep make_process_step(std::string_view name, std::span<const double> values, const std::string& where) {
  const Entry& entry = entry_named(name, where);
  const auto parameters = entry.method.parameters;
  if (values.size() != parameters.size())
    throw input_error(where, fmt::format("found {} values", values.size()),
                      fmt::format("{} takes {}", name, parameters.size()));
  for (std::size_t i = 0; i < values.size(); ++i)
    require_allowed(parameters[i], values[i], fmt::format("{}.{}", where, parameters[i].key));
  at_place(where, [&] { entry.check(values); });
  return {std::string(name), {values.begin(), values.end()}, where};
}

Processed process(const ProcessStep& step, const Accelerogram& record) {
  const Entry& entry = entry_named(step.name, step.where);
  return at_place(step.where, [&] {
    Processed processed = entry.apply(step.values, record);
    processed.done = fmt::format("{}: {}", step.name, processed.done);
    validate(processed.record, "");
    return processed;
  });
}

ProcessedRecord process_all(std::span<const ProcessStep> steps, const Accelerogram& record) {
  ProcessedRecord all{record, {}};
  for (const ProcessStep& step : steps) {
    Processed processed = process(step, all.record);
    all.record = std::move(processed.record);
    all.done.push_back(std::move(processed.done));
  }
  return all;
}

}  // namespace pilotis
