// A field of dots shown as characters: eight to a cell in Braille (Unicode 2800 to 28FF), two in ASCII.
#pragma once

#include <string>
#include <vector>

#include "apps/terminal.hpp"

namespace pilotis {

class Canvas {
 public:
  // columns and rows of cells, at least one each.
  Canvas(int columns, int rows, bool unicode);

  int dots_across() const { return columns_ * dots_x_; }
  int dots_down() const { return rows_ * dots_y_; }

  // A straight line between two dots, both included; (0, 0) is top left. What lies outside is left out. A cell has the
  // paint (any number from 0) of what was drawn into it last.
  void draw_line(int x0, int y0, int x1, int y1, int paint);

  // A row of cells; `escapes[paint]` begins a color, empty: none.
  std::string row_text(int row, const std::vector<std::string>& escapes) const;

 private:
  struct Cell {
    unsigned char dots = 0;  // one bit a dot, as the character counts them
    int paint = 0;
  };
  void set(int x, int y, int paint);
  std::string character(const Cell& cell) const;

  int columns_, rows_, dots_x_, dots_y_;
  bool unicode_;
  std::vector<Cell> cells_;  // row by row
};

}  // namespace pilotis
