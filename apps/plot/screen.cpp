#include "apps/plot/screen.hpp"

#include <algorithm>
#include <array>
#include <cmath>

#include "apps/plot/canvas.hpp"
#include "apps/text_layout.hpp"

namespace pilotis {

namespace {

constexpr int widest = 120, columns_per_x_tick = 9;

struct Frame {
  explicit Frame(bool unicode) {
    if (unicode) side = "│", tick = "┤", corner = "└", floor = "─", floor_tick = "┬", sample = "━━ ";
  }
  std::string side = "|", tick = "+", corner = "+", floor = "-", floor_tick = "+", sample = "-- ";
};

// Cyan, yellow, magenta, green, blue, red (ECMA-48); dim and bold for faint and strong lines.
std::string escape_of(LineWeight weight, std::size_t number) {
  constexpr std::array<const char*, 6> colors{"36", "33", "35", "32", "34", "31"};
  if (weight == LineWeight::faint) return "\x1b[2m";
  return std::string("\x1b[") + (weight == LineWeight::strong ? "1;" : "") + colors[number % colors.size()] + "m";
}

std::vector<std::string> escapes_of(const std::vector<ChartLine>& lines, const ScreenStyle& style) {
  std::vector<std::string> escapes;
  std::size_t number = 0;
  for (const ChartLine& line : lines) {
    escapes.push_back(style.color && lines.size() > 1 ? escape_of(line.weight, number) : "");
    if (line.weight != LineWeight::faint) ++number;
  }
  return escapes;
}

// Without color the faint ones cannot be told from the others.
std::vector<ChartLine> drawn_lines(const Chart& chart, const ScreenStyle& style) {
  std::vector<ChartLine> lines = chart.lines;
  const auto is_faint = [](const ChartLine& line) { return line.weight == LineWeight::faint; };
  if (!style.color && !std::all_of(lines.begin(), lines.end(), is_faint)) std::erase_if(lines, is_faint);
  return lines;
}

int dot_of(double place, int dots) { return static_cast<int>(std::lround(std::clamp(place, -1.0, 2.0) * (dots - 1))); }

void draw(const ChartLine& line, const ChartAxes& axes, int paint, Canvas& canvas) {
  const ChartLine thin = thinned(line, axes.x, canvas.dots_across());
  bool pen_down = false;
  int x0 = 0, y0 = 0;
  for (std::size_t i = 0; i < thin.x.size(); ++i) {
    const double across = axes.x.place_of(thin.x[i]), up = axes.y.place_of(thin.y[i]);
    if (!std::isfinite(across) || !std::isfinite(up)) {
      pen_down = false;
      continue;
    }
    const int x = dot_of(across, canvas.dots_across()), y = dot_of(1 - up, canvas.dots_down());
    canvas.draw_line(pen_down ? x0 : x, pen_down ? y0 : y, x, y, paint);
    pen_down = true;
    x0 = x, y0 = y;
  }
}

// The cell that the dot at `place` falls into.
std::size_t cell_of(double place, int dots, int cells) {
  return static_cast<std::size_t>(std::clamp(dot_of(place, dots) * cells / dots, 0, cells - 1));
}

// Numbers of the ticks by row; the others empty.
std::vector<std::string> row_labels(const Axis& y, int rows, const Canvas& canvas) {
  std::vector<std::string> labels(static_cast<std::size_t>(rows));
  for (const double tick : y.ticks) labels[cell_of(1 - y.place_of(tick), canvas.dots_down(), rows)] = tick_text(tick);
  return labels;
}

std::size_t widest_label(const Axis& y) {
  std::size_t widest_yet = 0;
  for (const double tick : y.ticks) widest_yet = std::max(widest_yet, tick_text(tick).size());
  return widest_yet;
}

// The axis below and its numbers, each centered below its tick where there is room.
std::string floor_text(const Axis& x, const Canvas& canvas, int columns, std::size_t margin, const Frame& frame) {
  std::vector<bool> ticks(static_cast<std::size_t>(columns), false);
  std::string numbers(margin + 1, ' ');
  for (const double tick : x.ticks) {
    const auto column = static_cast<int>(cell_of(x.place_of(tick), canvas.dots_across(), columns));
    const std::string number = tick_text(tick);
    const int end = static_cast<int>(margin) + 1 + columns, size = static_cast<int>(number.size());
    const int first = static_cast<int>(margin) + 1;
    const int begin = std::clamp(first + column - (size - 1) / 2, first, end - size);
    ticks[static_cast<std::size_t>(column)] = true;
    if (begin <= static_cast<int>(numbers.size()) - (numbers.back() == ' ' ? 1 : 0)) continue;
    numbers += std::string(static_cast<std::size_t>(begin) - numbers.size(), ' ') + number;
  }
  std::string text = std::string(margin, ' ') + frame.corner;
  for (const bool tick : ticks) text += tick ? frame.floor_tick : frame.floor;
  return text + "\n" + numbers + "\n";
}

// Without color lines cannot be told apart, but what they are can be said.
std::string plain_legend(const std::vector<ChartLine>& lines, std::size_t margin, const ScreenStyle& style) {
  std::string names;
  for (const ChartLine& line : lines)
    if (!line.name.empty()) names += (names.empty() ? "lines: " : ", ") + line.name;
  std::string text;
  for (const std::string& row : wrapped(names, static_cast<std::size_t>(style.width) - margin - 2))
    text += std::string(margin + 2, ' ') + row + "\n";
  return text;
}

std::string legend(const std::vector<ChartLine>& lines, const std::vector<std::string>& escapes, std::size_t margin,
                   const Frame& frame, const ScreenStyle& style) {
  if (lines.size() < 2) return "";
  if (!style.color) return plain_legend(lines, margin, style);
  std::string text, row;
  std::size_t used = 0;
  for (std::size_t i = 0; i < lines.size(); ++i) {
    if (lines[i].name.empty()) continue;
    const std::string name = clipped(lines[i].name, 40, style);
    const std::size_t width = columns_of(frame.sample + name) + 2;
    if (used > 0 && margin + used + width > static_cast<std::size_t>(style.width)) {
      text += std::string(margin, ' ') + row + "\n";
      row.clear();
      used = 0;
    }
    row += "  " + escapes[i] + frame.sample + "\x1b[0m" + name;
    used += width;
  }
  return row.empty() ? text : text + std::string(margin, ' ') + row + "\n";
}

}  // namespace

std::string chart_text(const Chart& chart, int rows, const ScreenStyle& style) {
  const Frame frame(style.unicode);
  const std::vector<ChartLine> lines = drawn_lines(chart, style);
  const int width = std::min(style.width, widest);
  const ChartAxes axes = axes_of(chart, width / columns_per_x_tick, std::max(2, rows / 3));
  const std::vector<std::string> escapes = escapes_of(lines, style);
  const std::size_t margin = widest_label(axes.y) + 3;
  const int columns = width - static_cast<int>(margin) - 2;
  Canvas canvas(columns, rows, style.unicode);
  for (std::size_t i = 0; i < lines.size(); ++i) draw(lines[i], axes, static_cast<int>(i), canvas);
  const std::string note = chart.note.empty() ? "" : ", " + chart.note;
  const std::string about = chart.title + ": " + chart.y_title + " over " + chart.x_title + note;
  std::string text =
      "  " + painted(clipped(about, static_cast<std::size_t>(width) - 2, style), Tone::strong, style) + "\n";
  const std::vector<std::string> labels = row_labels(axes.y, rows, canvas);
  for (int row = 0; row < rows; ++row) {
    const std::string& label = labels[static_cast<std::size_t>(row)];
    std::string line = right(label, margin - 1) + " " + (label.empty() ? frame.side : frame.tick);
    line += canvas.row_text(row, escapes);
    line.erase(line.find_last_not_of(' ') + 1);
    text += line + "\n";
  }
  text += floor_text(axes.x, canvas, columns, margin, frame);
  return text + legend(lines, escapes, margin, frame, style);
}

}  // namespace pilotis
