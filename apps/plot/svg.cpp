#include "apps/plot/svg.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <iterator>

#include "apps/text_layout.hpp"

namespace pilotis {

namespace {

// Pixels.
constexpr double page_width = 960, title_height = 44, history_height = 200, tall_height = 400, legend_row = 18;
constexpr double left_margin = 66, right_margin = 18, top_margin = 30, bottom_margin = 44;
constexpr double character_width = 6.3, bold_width = 7.6;  // of the text's 11 px and of a bold title's 12 px, about

// Colors that the color-blind can tell apart: Okabe & Ito 2008, Color universal design (from memory), yellow left out.
constexpr std::array<const char*, 7> colors{"#0072b2", "#d55e00", "#009e73", "#cc79a7",
                                            "#e69f00", "#56b4e9", "#000000"};

struct Box {
  double x, y, width, height;
};

class Picture {
 public:
  template <typename... Args>
  void add(fmt::format_string<Args...> format, Args&&... args) {
    fmt::format_to(std::back_inserter(text_), format, std::forward<Args>(args)...);
  }
  // `where`: start, middle or end of the text is at x.
  void add_text(double x, double y, const char* where, const std::string& text, const char* more = "") {
    add("<text x=\"{:.1f}\" y=\"{:.1f}\" text-anchor=\"{}\"{}>{}</text>\n", x, y, where, more, xml_text(text));
  }
  const std::string& text() const { return text_; }

 private:
  std::string text_;
};

std::string cut(const std::string& text, double width, double character = character_width) {
  return clipped(text, static_cast<std::size_t>(std::max(4.0, width / character)), ScreenStyle{});
}

// The title from the left, the note from the right.
void add_heading(Picture& picture, const Chart& chart, double left_end, double right_end, double y) {
  const double note = character_width * static_cast<double>(columns_of(chart.note));
  picture.add_text(left_end, y, "start", cut(chart.title, right_end - left_end - note, bold_width), " class=\"chart\"");
  if (!chart.note.empty()) picture.add_text(right_end, y, "end", chart.note);
}

const char* color_of(const ChartLine& line, std::size_t number) {
  return line.weight == LineWeight::faint ? "#b0b0b0" : colors[number % colors.size()];
}

const char* stroke_of(LineWeight weight) {
  if (weight == LineWeight::faint) return " stroke-width=\"0.7\"";
  if (weight == LineWeight::strong) return " stroke-width=\"2.2\"";
  if (weight == LineWeight::dashed) return " stroke-width=\"1.4\" stroke-dasharray=\"6 4\"";
  return " stroke-width=\"1.2\"";
}

void add_x_axis(Picture& picture, const Axis& x, const Box& box, const std::string& title) {
  const double floor = box.y + box.height;
  for (const double tick : x.ticks) {
    const double at = box.x + x.place_of(tick) * box.width;
    picture.add("<line class=\"grid\" x1=\"{0:.1f}\" y1=\"{1:.1f}\" x2=\"{0:.1f}\" y2=\"{2:.1f}\"/>\n", at, box.y,
                floor);
    picture.add("<line class=\"axis\" x1=\"{0:.1f}\" y1=\"{1:.1f}\" x2=\"{0:.1f}\" y2=\"{2:.1f}\"/>\n", at, floor,
                floor + 4);
    picture.add_text(at, floor + 17, "middle", tick_text(tick));
  }
  picture.add_text(box.x + box.width / 2, floor + 34, "middle", title);
}

void add_y_axis(Picture& picture, const Axis& y, const Box& box, const std::string& title) {
  for (const double tick : y.ticks) {
    const double at = box.y + (1 - y.place_of(tick)) * box.height;
    const char* kind = tick == 0 && y.low < 0 ? "zero" : "grid";
    picture.add("<line class=\"{0}\" x1=\"{1:.1f}\" y1=\"{2:.1f}\" x2=\"{3:.1f}\" y2=\"{2:.1f}\"/>\n", kind, box.x, at,
                box.x + box.width);
    picture.add("<line class=\"axis\" x1=\"{0:.1f}\" y1=\"{1:.1f}\" x2=\"{2:.1f}\" y2=\"{1:.1f}\"/>\n", box.x - 4, at,
                box.x);
    picture.add_text(box.x - 8, at + 4, "end", tick_text(tick));
  }
  picture.add("<text transform=\"translate({:.1f} {:.1f}) rotate(-90)\" text-anchor=\"middle\">{}</text>\n", box.x - 50,
              box.y + box.height / 2, xml_text(title));
}

void add_line(Picture& picture, const ChartLine& line, const ChartAxes& axes, const Box& box, std::size_t number) {
  const ChartLine thin = thinned(line, axes.x, static_cast<int>(box.width));
  std::string path;
  bool pen_down = false;
  for (std::size_t i = 0; i < thin.x.size(); ++i) {
    const double across = axes.x.place_of(thin.x[i]), up = axes.y.place_of(thin.y[i]);
    const bool there = std::isfinite(across) && std::isfinite(up);
    if (there)
      fmt::format_to(std::back_inserter(path), "{}{:.1f} {:.1f}", pen_down ? "L" : "M", box.x + across * box.width,
                     box.y + (1 - up) * box.height);
    pen_down = there;
  }
  if (!path.empty())
    picture.add("<path d=\"{}\" stroke=\"{}\"{}/>\n", path, color_of(line, number), stroke_of(line.weight));
}

std::vector<std::size_t> named_lines(const Chart& chart) {
  std::vector<std::size_t> named;
  for (std::size_t i = 0; i < chart.lines.size(); ++i)
    if (!chart.lines[i].name.empty()) named.push_back(i);
  return named.size() > 1 ? named : std::vector<std::size_t>{};
}

int legend_columns(double width) { return std::max(1, static_cast<int>(width / 215)); }

double legend_height(const Chart& chart, double width) {
  const auto entries = static_cast<int>(named_lines(chart).size());
  const int columns = legend_columns(width);
  return legend_row * ((entries + columns - 1) / columns);
}

void add_legend(Picture& picture, const Chart& chart, const Box& box, const std::vector<std::size_t>& numbers) {
  const int columns = legend_columns(box.width);
  const double wide = box.width / columns;
  int place = 0;
  for (const std::size_t i : named_lines(chart)) {
    const double x = box.x + (place % columns) * wide, y = box.y + (place / columns) * legend_row;
    picture.add("<line x1=\"{:.1f}\" y1=\"{:.1f}\" x2=\"{:.1f}\" y2=\"{:.1f}\" stroke=\"{}\"{}/>\n", x, y, x + 24, y,
                color_of(chart.lines[i], numbers[i]), stroke_of(chart.lines[i].weight));
    picture.add_text(x + 30, y + 4, "start", cut(chart.lines[i].name, wide - 40));
    ++place;
  }
}

// Lines count through the colors; the faint ones have none.
std::vector<std::size_t> color_numbers(const Chart& chart) {
  std::vector<std::size_t> numbers;
  std::size_t next = 0;
  for (const ChartLine& line : chart.lines) numbers.push_back(line.weight == LineWeight::faint ? 0 : next++);
  return numbers;
}

void add_chart(Picture& picture, const Chart& chart, const Box& outer) {
  const double legend = legend_height(chart, outer.width - left_margin - right_margin);
  const Box box{outer.x + left_margin, outer.y + top_margin, outer.width - left_margin - right_margin,
                outer.height - top_margin - bottom_margin - legend};
  const ChartAxes axes = axes_of(chart, static_cast<int>(box.width / 60), static_cast<int>(box.height / 30));
  add_heading(picture, chart, outer.x + 16, box.x + box.width, outer.y + 20);
  add_x_axis(picture, axes.x, box, chart.x_title);
  add_y_axis(picture, axes.y, box, chart.y_title);
  const std::vector<std::size_t> numbers = color_numbers(chart);
  picture.add("<g fill=\"none\" stroke-linejoin=\"round\">\n");
  for (std::size_t i = 0; i < chart.lines.size(); ++i) add_line(picture, chart.lines[i], axes, box, numbers[i]);
  picture.add("</g>\n<rect class=\"frame\" x=\"{:.1f}\" y=\"{:.1f}\" width=\"{:.1f}\" height=\"{:.1f}\"/>\n", box.x,
              box.y, box.width, box.height);
  add_legend(picture, chart, {box.x, box.y + box.height + bottom_margin + 4, box.width, legend}, numbers);
}

double height_of(const std::vector<Chart>& row) {
  double height = 0;
  for (const Chart& chart : row)
    height = std::max(height, (chart.tall ? tall_height : history_height) +
                                  legend_height(chart, page_width / static_cast<double>(row.size()) - 84));
  return height;
}

}  // namespace

std::string xml_text(const std::string& text) {
  std::string safe;
  for (const char c : text) switch (c) {
      case '&':
        safe += "&amp;";
        break;
      case '<':
        safe += "&lt;";
        break;
      case '>':
        safe += "&gt;";
        break;
      case '"':
        safe += "&quot;";
        break;
      default:
        safe += static_cast<unsigned char>(c) < 0x20 ? ' ' : c;
    }
  return safe;
}

std::string svg_of(const std::string& title, const std::vector<std::vector<Chart>>& rows) {
  double height = title_height;
  for (const std::vector<Chart>& row : rows) height += height_of(row);
  Picture picture;
  picture.add(
      "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<svg xmlns=\"http://www.w3.org/2000/svg\" viewBox=\"0 0 {0:.0f} "
      "{1:.0f}\" "
      "width=\"{0:.0f}\" height=\"{1:.0f}\" role=\"img\">\n<title>{2}</title>\n<style>\n"
      "text {{ font: 11px sans-serif; fill: #222; }}\n.page {{ font-size: 17px; font-weight: bold; }}\n"
      ".chart {{ font-size: 12px; font-weight: bold; }}\n.grid {{ stroke: #e4e4e4; stroke-width: 1; }}\n"
      ".zero {{ stroke: #999; stroke-width: 1; }}\n.axis {{ stroke: #444; stroke-width: 1; }}\n"
      ".frame {{ fill: none; stroke: #444; stroke-width: 1; }}\n</style>\n"
      "<rect width=\"100%\" height=\"100%\" fill=\"white\"/>\n",
      page_width, height, xml_text(title));
  picture.add_text(16, 28, "start", clipped(title, 95, ScreenStyle{}), " class=\"page\"");
  double y = title_height;
  for (const std::vector<Chart>& row : rows) {
    const double width = page_width / static_cast<double>(row.size()), tall = height_of(row);
    for (std::size_t i = 0; i < row.size(); ++i)
      add_chart(picture, row[i], {static_cast<double>(i) * width, y, width, tall});
    y += tall;
  }
  picture.add("</svg>\n");
  return picture.text();
}

}  // namespace pilotis
