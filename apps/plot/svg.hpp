// Charts as one SVG picture (Scalable Vector Graphics 1.1, W3C), readable without anything else.
#pragma once

#include "apps/plot/chart.hpp"

namespace pilotis {

// Rows of charts, one below the other; the charts of a row share its width. Axes with ticks, numbers and titles, a fine
// grid, a legend below where several lines of a chart have names. `title` stands on top and is the picture's title for
// readers of the screen.
std::string svg_of(const std::string& title, const std::vector<std::vector<Chart>>& rows);

// Text as XML has it: & < > " escaped; control characters, which XML 1.0 does not allow, become blanks.
std::string xml_text(const std::string& text);

}  // namespace pilotis
