// A chart in characters: Braille dots where the screen has Unicode, dots and ticks of ASCII elsewhere.
#pragma once

#include "apps/plot/chart.hpp"
#include "apps/terminal.hpp"

namespace pilotis {

// Title, `rows` lines of picture with ticks and numbers on the left, an axis with numbers below, and a legend where
// several lines have names; within style.width columns. Lines have colors of their own where the style has color and
// there are several; without color the faint ones are left out beside others.
std::string chart_text(const Chart& chart, int rows, const ScreenStyle& style);

}  // namespace pilotis
