#include "apps/fit_picture.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <limits>

#include "apps/text_layout.hpp"
#include "core/units/units.hpp"

namespace pilotis {

namespace {

constexpr double width = 860, height = 560, left_margin = 74, right_margin = 24, top = 84, bottom = 96;

// A logarithmic axis: `low` and `high` lie at `begin` and `end` on the paper.
struct Axis {
  double low, high, begin, end;
  double place(double value) const { return begin + std::log(value / low) / std::log(high / low) * (end - begin); }
};

bool drawable(double value) { return std::isfinite(value) && value > 0; }

std::string escaped(const std::string& text) {
  std::string safe;
  for (const char c : text) safe += c == '&' ? "&amp;" : c == '<' ? "&lt;" : c == '>' ? "&gt;" : std::string(1, c);
  return safe;
}

// 1, 2 and 5 times the powers of ten between both ends.
std::vector<double> ticks(const Axis& axis) {
  std::vector<double> list;
  for (int power = static_cast<int>(std::floor(std::log10(axis.low))); power <= std::ceil(std::log10(axis.high));
       ++power)
    for (const double digit : {1.0, 2.0, 5.0}) {
      const double value = digit * std::pow(10.0, power);
      if (value >= axis.low * (1 - 1e-9) && value <= axis.high * (1 + 1e-9)) list.push_back(value);
    }
  return list;
}

Axis acceleration_axis(const FitPicture& picture) {
  double low = std::numeric_limits<double>::infinity(), high = 0;
  const auto see = [&](const std::vector<double>& values) {
    for (const double value : values)
      if (drawable(value)) {
        low = std::min(low, value / standard_gravity);
        high = std::max(high, value / standard_gravity);
      }
  };
  for (const PictureCurve& curve : picture.curves) see(curve.accelerations);
  for (const std::vector<double>& values : picture.thin) see(values);
  return {low / 1.15, high * 1.15, height - bottom, top};
}

std::string text_at(double x, double y, const std::string& text, const std::string& anchor = "middle",
                    const std::string& more = "") {
  return fmt::format("<text x=\"{:.1f}\" y=\"{:.1f}\" text-anchor=\"{}\"{}>{}</text>\n", x, y, anchor, more,
                     escaped(text));
}

std::string path_of(const std::vector<double>& periods, const std::vector<double>& values, const Axis& x, const Axis& y,
                    const std::string& style) {
  std::string path;
  bool on_paper = false;
  for (std::size_t i = 0; i < values.size(); ++i) {
    const bool draw = drawable(values[i]);
    if (draw)
      path += fmt::format("{}{:.1f} {:.1f}", on_paper ? "L" : "M", x.place(periods[i]),
                          y.place(values[i] / standard_gravity));
    on_paper = draw;
  }
  return fmt::format("<path d=\"{}\" fill=\"none\" {}/>\n", path, style);
}

std::string style_of(PictureLine line) {
  if (line == PictureLine::target) return "stroke=\"#111\" stroke-width=\"2.4\"";
  if (line == PictureLine::before) return "stroke=\"#999\" stroke-width=\"1.8\" stroke-dasharray=\"6 4\"";
  return "stroke=\"#b3261e\" stroke-width=\"2.2\"";
}

std::string frame(const FitPicture& picture, const Axis& x, const Axis& y) {
  std::string svg =
      fmt::format("<rect x=\"{:.1f}\" y=\"{:.1f}\" width=\"{:.1f}\" height=\"{:.1f}\" fill=\"#eef3f8\"/>\n",
                  x.place(picture.from), top, x.place(picture.to) - x.place(picture.from), height - bottom - top);
  for (const double value : ticks(x)) {
    svg +=
        fmt::format("<path d=\"M{0:.1f} {1:.1f}V{2:.1f}\" stroke=\"#ddd\"/>\n", x.place(value), top, height - bottom);
    svg += text_at(x.place(value), height - bottom + 18, fmt::format("{:g}", value));
  }
  for (const double value : ticks(y)) {
    svg += fmt::format("<path d=\"M{0:.1f} {1:.1f}H{2:.1f}\" stroke=\"#ddd\"/>\n", left_margin, y.place(value),
                       width - right_margin);
    svg += text_at(left_margin - 8, y.place(value) + 4, fmt::format("{:g}", value), "end");
  }
  svg += fmt::format("<rect x=\"{}\" y=\"{}\" width=\"{}\" height=\"{}\" fill=\"none\" stroke=\"#555\"/>\n",
                     left_margin, top, width - left_margin - right_margin, height - top - bottom);
  svg += text_at((left_margin + width - right_margin) / 2, height - bottom + 40,
                 "period (s); shaded: the range of the fit");
  svg += text_at(0, 0, "pseudo-acceleration (g)", "middle",
                 fmt::format(" transform=\"translate(18 {:.1f}) rotate(-90)\"", (top + height - bottom) / 2));
  return svg;
}

std::string legend(const FitPicture& picture) {
  std::string svg;
  double x = left_margin;
  for (const PictureCurve& curve : picture.curves) {
    svg += fmt::format("<path d=\"M{:.1f} {:.1f}h30\" {}/>\n", x, height - 24, style_of(curve.line));
    svg += text_at(x + 36, height - 20, curve.name, "start");
    x += 60 + 7 * static_cast<double>(curve.name.size());
  }
  return svg;
}

}  // namespace

std::string svg_of(const FitPicture& picture) {
  const Axis x{picture.periods.front(), picture.periods.back(), left_margin, width - right_margin},
      y = acceleration_axis(picture);
  std::string svg = fmt::format(
      "<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 {0} {1}\" width=\"{0}\" height=\"{1}\" "
      "font-family=\"sans-serif\" font-size=\"12\" fill=\"#222\">\n<rect width=\"100%\" height=\"100%\" "
      "fill=\"#fff\"/>\n",
      width, height);
  svg += text_at(left_margin, 24, picture.title, "start", " font-size=\"16\" font-weight=\"bold\"");
  double line_at = 42;
  for (const std::string& line : wrapped(picture.subtitle, 140)) {
    svg += text_at(left_margin, line_at, line, "start", " font-size=\"10\"");
    line_at += 14;
  }
  svg += frame(picture, x, y);
  for (const std::vector<double>& values : picture.thin)
    svg += path_of(picture.periods, values, x, y, "stroke=\"#e3b0ac\" stroke-width=\"0.8\"");
  for (const PictureCurve& curve : picture.curves)
    svg += path_of(picture.periods, curve.accelerations, x, y, style_of(curve.line));
  return svg + legend(picture) + "</svg>\n";
}

}  // namespace pilotis
