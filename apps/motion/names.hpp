// What is shown of records: their names, and the units of their numbers.
#pragma once

#include "apps/motion/numbers.hpp"
#include "apps/text_layout.hpp"

namespace pilotis {

// A short name each: the file's, without its folder where all stand in the same one, and the component's.
std::vector<std::string> shown_names(const std::vector<RecordNumbers>& records);

// For the screen: accelerations in g, the rest in SI.
ShownUnit screen_unit(Dimension dimension);

// "5 %".
std::string percent_text(double ratio);

}  // namespace pilotis
