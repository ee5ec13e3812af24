#include "apps/plot/canvas.hpp"

#include <array>
#include <cstdlib>

namespace pilotis {

namespace {

// Bits of the dots of a Braille cell, [row][column] (The Unicode Standard, block "Braille Patterns").
constexpr unsigned char braille[4][2] = {{0x01, 0x08}, {0x02, 0x10}, {0x04, 0x20}, {0x40, 0x80}};

}  // namespace

Canvas::Canvas(int columns, int rows, bool unicode)
    : columns_(columns),
      rows_(rows),
      dots_x_(unicode ? 2 : 1),
      dots_y_(unicode ? 4 : 2),
      unicode_(unicode),
      cells_(static_cast<std::size_t>(columns) * static_cast<std::size_t>(rows)) {}

void Canvas::set(int x, int y, int paint) {
  if (x < 0 || y < 0 || x >= dots_across() || y >= dots_down()) return;
  Cell& cell = cells_[static_cast<std::size_t>((y / dots_y_) * columns_ + x / dots_x_)];
  const int row = y % dots_y_, column = x % dots_x_;
  cell.dots |= unicode_ ? braille[row][column] : static_cast<unsigned char>(1 << row);
  cell.paint = paint;
}

// Bresenham 1965, Algorithm for computer control of a digital plotter (from memory).
void Canvas::draw_line(int x0, int y0, int x1, int y1, int paint) {
  const int dx = std::abs(x1 - x0), dy = -std::abs(y1 - y0);
  const int step_x = x0 < x1 ? 1 : -1, step_y = y0 < y1 ? 1 : -1;
  for (int error = dx + dy;;) {
    set(x0, y0, paint);
    if (x0 == x1 && y0 == y1) return;
    const int twice = 2 * error;
    if (twice >= dy) {
      error += dy;
      x0 += step_x;
    }
    if (twice <= dx) {
      error += dx;
      y0 += step_y;
    }
  }
}

std::string Canvas::character(const Cell& cell) const {
  constexpr std::array<const char*, 4> ascii{" ", "'", ".", ":"};
  if (!unicode_) return ascii[cell.dots];
  if (cell.dots == 0) return " ";
  // U+2800 + dots in UTF-8.
  return {'\xE2', static_cast<char>(0xA0 | (cell.dots >> 6)), static_cast<char>(0x80 | (cell.dots & 0x3F))};
}

std::string Canvas::row_text(int row, const std::vector<std::string>& escapes) const {
  std::string text, now;
  for (int column = 0; column < columns_; ++column) {
    const Cell& cell = cells_[static_cast<std::size_t>(row * columns_ + column)];
    const std::string& wanted = cell.dots == 0 ? now : escapes[static_cast<std::size_t>(cell.paint)];
    if (wanted != now) text += (now.empty() ? "" : "\x1b[0m") + wanted;
    now = wanted;
    text += character(cell);
  }
  return text + (now.empty() ? "" : "\x1b[0m");
}

}  // namespace pilotis
