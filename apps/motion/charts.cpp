#include "apps/motion/charts.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <iterator>

#include "apps/motion/names.hpp"
#include "core/verdict/statistics.hpp"

namespace pilotis {

namespace {

std::vector<double> divided(const std::vector<double>& values, double factor) {
  std::vector<double> all;
  for (const double value : values) all.push_back(value / factor);
  return all;
}

// "quay-01.csv, 2 %" where there are several of both.
std::string line_name(const std::string& record, std::size_t records, double damping_ratio, std::size_t dampings) {
  if (dampings < 2) return record;
  return (records < 2 ? "" : record + ", ") + percent_text(damping_ratio) + (records < 2 ? " damped" : "");
}

// "" or ", 5 % damped" for a title.
std::string damping_title(const MotionRequest& request) {
  if (request.damping_ratios.size() != 1) return "";
  return ", " + percent_text(request.damping_ratios[0]) + " damped";
}

ChartLine percentile_line(const std::vector<ChartLine>& lines, double percentile, std::string name, LineWeight weight) {
  ChartLine line{std::move(name), lines.front().x, {}, weight};
  std::vector<double> column(lines.size());
  const OrderPosition at = percentile_position(lines.size(), percentile);
  for (std::size_t i = 0; i < line.x.size(); ++i) {
    std::transform(lines.begin(), lines.end(), column.begin(), [i](const ChartLine& l) { return l.y[i]; });
    std::sort(column.begin(), column.end());
    line.y.push_back(std::lerp(column[at.lower], column[at.upper], at.fraction));
  }
  return line;
}

// Lines over the same x, one a record: as they are, or pale behind what is common to them.
void add_lines(Chart& chart, std::vector<ChartLine> lines, const std::string& about) {
  const bool apart = lines.size() <= most_drawn_apart;
  std::vector<ChartLine> common;
  if (!apart) {
    common.push_back(percentile_line(lines, 50, "median" + about, LineWeight::strong));
    common.push_back(percentile_line(lines, 16, "16th percentile" + about, LineWeight::dashed));
    common.push_back(percentile_line(lines, 84, "84th percentile" + about, LineWeight::dashed));
    for (ChartLine& line : lines) line.name.clear(), line.weight = LineWeight::faint;
    lines.front().name = fmt::format("{} records{}", lines.size(), about);
  }
  for (auto* some : {&lines, &common}) std::move(some->begin(), some->end(), std::back_inserter(chart.lines));
}

Chart history_chart(const std::string& title, const char* what, const std::vector<double>& values, double step,
                    Dimension dimension) {
  const ShownUnit unit = screen_unit(dimension);
  const auto largest =
      std::max_element(values.begin(), values.end(), [](double a, double b) { return std::abs(a) < std::abs(b); });
  Chart chart{title,
              fmt::format("peak {:.3g} {} at {:g} s", *largest / unit.factor, unit.unit,
                          step * static_cast<double>(largest - values.begin())),
              "time (s)",
              fmt::format("{} ({})", what, unit.unit),
              false,
              false,
              false,
              {}};
  ChartLine line{"", {}, divided(values, unit.factor), LineWeight::normal};
  for (std::size_t i = 0; i < values.size(); ++i) line.x.push_back(step * static_cast<double>(i));
  chart.lines.push_back(std::move(line));
  return chart;
}

struct OrdinateText {
  const char* name;
  Dimension dimension;
};

OrdinateText text_of(Ordinate ordinate) {
  if (ordinate == Ordinate::pseudo_acceleration) return {"pseudo-acceleration", Dimension::acceleration};
  if (ordinate == Ordinate::pseudo_velocity) return {"pseudo-velocity", Dimension::velocity};
  return {"spectral displacement", Dimension::length};
}

const std::vector<double>& values_of(const SpectrumCurve& curve, Ordinate ordinate) {
  if (ordinate == Ordinate::pseudo_acceleration) return curve.pseudo_acceleration;
  if (ordinate == Ordinate::pseudo_velocity) return curve.pseudo_velocity;
  return curve.displacement;
}

// Logarithmic where the periods (or frequencies) reach over more than a decade and a half.
bool wide(const std::vector<double>& values) {
  double low = 0, high = 0;
  for (const double value : values)
    if (value > 0) low = low > 0 ? std::min(low, value) : value, high = std::max(high, value);
  return low > 0 && high > 30 * low;
}

Chart empty_spectrum(std::string title, std::string y_title, const MotionRequest& request) {
  return {std::move(title), "", "period (s)", std::move(y_title), wide(request.periods), false, true, {}};
}

// What is held and what follows from it.
Chart inelastic_chart(const std::vector<RecordNumbers>& records, const MotionRequest& request) {
  const bool ductility_held = request.inelastic->held == InelasticRequest::Held::ductility;
  Chart chart =
      empty_spectrum(fmt::format("{} spectrum, {}{}", ductility_held ? "Required strength" : "Ductility demand",
                                 request.inelastic->text, damping_title(request)),
                     ductility_held ? "yield acceleration (g)" : "ductility (-)", request);
  chart.logarithmic_y = !ductility_held;
  const std::vector<std::string> names = shown_names(records);
  for (std::size_t d = 0; d < request.damping_ratios.size(); ++d) {
    std::vector<ChartLine> lines;
    for (std::size_t r = 0; r < records.size(); ++r) {
      if (d >= records[r].inelastic.size()) continue;
      const InelasticCurve& curve = records[r].inelastic[d];
      ChartLine line{line_name(names[r], names.size(), curve.damping_ratio, request.damping_ratios.size()), {}, {}};
      for (const InelasticPoint& point : curve.points) {
        line.x.push_back(point.period);
        line.y.push_back(ductility_held ? point.yield_acceleration / standard_gravity : point.peak.ductility);
      }
      lines.push_back(std::move(line));
    }
    if (!lines.empty()) add_lines(chart, std::move(lines), line_name("", 1, request.damping_ratios[d], 1));
  }
  return chart;
}

Chart fourier_chart(const std::vector<RecordNumbers>& records) {
  Chart chart{"Fourier amplitude spectrum", "", "frequency (Hz)", "amplitude (m/s)", true, true, true, {}};
  const std::vector<std::string> names = shown_names(records);
  for (std::size_t r = 0; r < records.size(); ++r) {
    const FourierAmplitudes& fourier = records[r].fourier;
    ChartLine line{names[r], {}, {}};
    for (std::size_t i = 0; i < fourier.frequencies.size(); ++i) {
      if (fourier.frequencies[i] < 0.05) continue;  // Hz: below is the drift of the base line
      line.x.push_back(fourier.frequencies[i]);
      line.y.push_back(fourier.amplitudes[i]);
    }
    if (records.size() > most_drawn_apart) line.weight = LineWeight::faint, line.name.clear();
    chart.lines.push_back(std::move(line));
  }
  return chart;
}

Chart pair_chart(const std::vector<RecordNumbers>& records, const MotionRequest& request, const PairNumbers& pair) {
  Chart chart = spectrum_chart(records, request, Ordinate::pseudo_acceleration);
  chart.title = "RotD50 and RotD100" + damping_title(request);
  for (const RotatedSpectrum& spectrum : pair.spectra) {
    const std::string about = pair.spectra.size() > 1 ? ", " + percent_text(spectrum.damping_ratio) : "";
    chart.lines.push_back({"RotD50" + about, spectrum.periods,
                           divided(spectrum.median_pseudo_acceleration, standard_gravity), LineWeight::strong});
    chart.lines.push_back({"RotD100" + about, spectrum.periods,
                           divided(spectrum.largest_pseudo_acceleration, standard_gravity), LineWeight::strong});
  }
  return chart;
}

}  // namespace

std::vector<Chart> history_charts(const RecordNumbers& record, const std::string& name) {
  const MotionHistories& all = record.histories;
  return {history_chart(name, "acceleration", all.acceleration, all.step, Dimension::acceleration),
          history_chart(name, "velocity", all.velocity, all.step, Dimension::velocity),
          history_chart(name, "displacement", all.displacement, all.step, Dimension::length)};
}

Chart spectrum_chart(const std::vector<RecordNumbers>& records, const MotionRequest& request, Ordinate ordinate) {
  const OrdinateText text = text_of(ordinate);
  const ShownUnit unit = screen_unit(text.dimension);
  Chart chart = empty_spectrum("Response spectrum" + damping_title(request),
                               fmt::format("{} ({})", text.name, unit.unit), request);
  const std::vector<std::string> names = shown_names(records);
  for (std::size_t d = 0; d < request.damping_ratios.size(); ++d) {
    std::vector<ChartLine> lines;
    for (std::size_t r = 0; r < records.size(); ++r)
      lines.push_back({line_name(names[r], names.size(), request.damping_ratios[d], request.damping_ratios.size()),
                       records[r].spectrum.periods,
                       divided(values_of(records[r].spectrum.curves[d], ordinate), unit.factor)});
    add_lines(chart, std::move(lines),
              request.damping_ratios.size() > 1 ? ", " + percent_text(request.damping_ratios[d]) : "");
  }
  return chart;
}

std::vector<Chart> further_charts(const std::vector<RecordNumbers>& records, const MotionRequest& request,
                                  const PairNumbers& pair) {
  std::vector<Chart> charts;
  if (!pair.spectra.empty()) charts.push_back(pair_chart(records, request, pair));
  if (request.inelastic) charts.push_back(inelastic_chart(records, request));
  if (request.fourier) charts.push_back(fourier_chart(records));
  return charts;
}

std::vector<std::vector<Chart>> picture_rows(const std::vector<RecordNumbers>& records, const MotionRequest& request,
                                             const PairNumbers& pair) {
  std::vector<std::vector<Chart>> rows;
  const std::vector<std::string> names = shown_names(records);
  if (records.size() == 1)
    for (Chart& chart : history_charts(records[0], names[0])) rows.push_back({std::move(chart)});
  else if (records.size() <= most_drawn_apart)
    for (std::size_t r = 0; r < records.size(); ++r) rows.push_back(history_charts(records[r], names[r]));
  rows.push_back({spectrum_chart(records, request, Ordinate::pseudo_acceleration)});
  if (records.size() > most_drawn_apart)
    for (const Ordinate ordinate : {Ordinate::pseudo_velocity, Ordinate::displacement})
      rows.push_back({spectrum_chart(records, request, ordinate)});
  for (Chart& chart : further_charts(records, request, pair)) rows.push_back({std::move(chart)});
  return rows;
}

}  // namespace pilotis
