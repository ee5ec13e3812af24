#include "apps/motion/text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <sstream>

#include "apps/motion/names.hpp"
#include "apps/text_table.hpp"

namespace pilotis {

namespace {

using Align = TextTable::Align;

// Four significant digits, zeros at the end kept so that a column reads evenly.
std::string number(double value) {
  if (!std::isfinite(value)) return "-";
  if (value == 0) return "0";
  return fmt::format("{:#.4g}", value);
}

std::string in_screen_unit(double value, Dimension dimension) { return number(value / screen_unit(dimension).factor); }

// The name over two lines or more, then the unit.
std::string heading(const Measure& measure) {
  std::string text(measure.name);
  std::replace(text.begin(), text.end(), '_', '\n');
  return text + "\n" + screen_unit(measure.dimension).unit;
}

std::size_t width_of(const Measure& measure) {
  std::size_t widest = 9, begin = 0;  // a number such as -0.001234
  const std::string text = heading(measure);
  for (std::size_t i = 0; i <= text.size(); ++i)
    if (i == text.size() || text[i] == '\n') widest = std::max(widest, i - begin), begin = i + 1;
  return widest + 2;
}

// How many of the measures from `first` fit beside the names; one at least.
std::size_t fitting(const MotionRequest& request, std::size_t first, std::size_t names, int width) {
  if (width <= 0) return request.measures.size() - first;
  std::size_t used = names + 2, count = 0;
  for (std::size_t i = first; i < request.measures.size(); ++i) {
    used += width_of(*request.measures[i]);
    if (count > 0 && used > static_cast<std::size_t>(width)) break;
    ++count;
  }
  return count;
}

std::string block(const std::vector<RecordNumbers>& records, const std::vector<std::string>& names,
                  const MotionRequest& request, std::size_t first, std::size_t count) {
  std::vector<TextTable::Column> columns{{"record", Align::left}};
  for (std::size_t i = first; i < first + count; ++i) columns.push_back({heading(*request.measures[i])});
  TextTable table(columns);
  for (std::size_t r = 0; r < records.size(); ++r) {
    std::vector<std::string> cells{names[r]};
    for (std::size_t i = first; i < first + count; ++i)
      cells.push_back(in_screen_unit(records[r].measures[i], request.measures[i]->dimension));
    table.add_row(std::move(cells));
  }
  return table.text();
}

// Every line cut to the screen's width.
std::string fitted(const std::string& text, int width) {
  if (width <= 0) return text;
  const ScreenStyle style = screen_style(stdout);
  std::istringstream lines(text);
  std::string cut;
  for (std::string line; std::getline(lines, line);)
    cut += clipped(line, static_cast<std::size_t>(width), style) + "\n";
  return cut;
}

}  // namespace

std::string measures_list() {
  std::string text;
  for (const Measure& measure : measure_catalogue())
    text += fmt::format("{} ({}): {}\n    {}\n", measure.name, si_unit(measure.dimension), measure.long_name,
                        measure.source);
  return text;
}

std::string record_text(const RecordNumbers& record, const MotionRequest& request, int width) {
  std::string text = fmt::format("{}: {}, in {}, {} samples every {:g} s, {:g} s long\n", shown_names({record})[0],
                                 record.format, record.unit, record.samples, record.record.step,
                                 record.record.step * static_cast<double>(record.samples - 1));
  if (request.measures.empty()) return text;
  TextTable table({{"measure", Align::left}, {"value"}, {"unit", Align::left}, {"what it is", Align::left}});
  for (std::size_t i = 0; i < request.measures.size(); ++i) {
    const Measure& measure = *request.measures[i];
    table.add_row({std::string(measure.name), in_screen_unit(record.measures[i], measure.dimension),
                   screen_unit(measure.dimension).unit, std::string(measure.long_name)});
  }
  return text + fitted(table.text(), width);
}

std::string measures_table(const std::vector<RecordNumbers>& records, const MotionRequest& request, int width) {
  const std::vector<std::string> names = shown_names(records);
  std::size_t widest = 6;
  for (const std::string& name : names) widest = std::max(widest, columns_of(name));
  std::string text;
  for (std::size_t first = 0; first < request.measures.size();) {
    const std::size_t count = fitting(request, first, widest, width);
    text += (first > 0 ? "\n" : "") + block(records, names, request, first, count);
    first += count;
  }
  return text;
}

std::string spectrum_table(const RecordNumbers& record, const std::string& name, std::size_t every) {
  std::string text;
  for (const SpectrumCurve& curve : record.spectrum.curves) {
    TextTable table({{"period\ns"},
                     {"displacement\nm"},
                     {"velocity\nm/s"},
                     {"acceleration\ng"},
                     {"pseudo-velocity\nm/s"},
                     {"pseudo-acceleration\ng"}});
    for (std::size_t i = 0; i < record.spectrum.periods.size(); i += every)
      table.add_row({number(record.spectrum.periods[i]), number(curve.displacement[i]), number(curve.velocity[i]),
                     number(curve.acceleration[i] / standard_gravity), number(curve.pseudo_velocity[i]),
                     number(curve.pseudo_acceleration[i] / standard_gravity)});
    text += fmt::format("{}: response spectrum, {} damped\n{}", name, percent_text(curve.damping_ratio), table.text());
  }
  return text;
}

std::string inelastic_table(const RecordNumbers& record, const std::string& name, const InelasticRequest& held,
                            std::size_t every) {
  std::string text;
  for (const InelasticCurve& curve : record.inelastic) {
    TextTable table({{"period\ns"},
                     {"yield acceleration\ng"},
                     {"of the elastic\nstrength"},
                     {"ductility\n-"},
                     {"peak displacement\nm"},
                     {"residual\nm"},
                     {"strength\nfound", Align::left}});
    for (std::size_t i = 0; i < curve.points.size(); i += every) {
      const InelasticPoint& point = curve.points[i];
      table.add_row({number(point.period), number(point.yield_acceleration / standard_gravity),
                     number(point.strength_ratio), number(point.peak.ductility), number(point.peak.displacement),
                     number(point.peak.residual),
                     held.held == InelasticRequest::Held::ductility ? word_of(point.found) : ""});
    }
    text += fmt::format("{}: inelastic spectrum, {}, post-yield ratio {:g}, {} damped\n{}", name, held.text,
                        held.post_yield_ratio, percent_text(curve.damping_ratio), table.text());
  }
  return text;
}

std::string pair_table(const PairNumbers& pair, std::size_t every) {
  std::string text;
  for (const RotatedSpectrum& spectrum : pair.spectra) {
    TextTable table({{"period\ns"},
                     {"RotD50\nm"},
                     {"RotD100\nm"},
                     {"RotD50\npseudo-acceleration\ng"},
                     {"RotD100\npseudo-acceleration\ng"},
                     {"direction of\nRotD100\ndegrees"}});
    for (std::size_t i = 0; i < spectrum.periods.size(); i += every)
      table.add_row({number(spectrum.periods[i]), number(spectrum.displacement[i].median),
                     number(spectrum.displacement[i].largest),
                     number(spectrum.median_pseudo_acceleration[i] / standard_gravity),
                     number(spectrum.largest_pseudo_acceleration[i] / standard_gravity),
                     fmt::format("{}", spectrum.displacement[i].direction_of_largest)});
    text += fmt::format("{} and {}: {} damped; directions from the first component towards the second\n{}", pair.first,
                        pair.second, percent_text(spectrum.damping_ratio), table.text());
  }
  return text;
}

}  // namespace pilotis
