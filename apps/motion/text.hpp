// Numbers of records as tables for the screen. Accelerations in g, the rest in SI.
#pragma once

#include <string>

#include "apps/motion/pair.hpp"
#include "apps/terminal.hpp"

namespace pilotis {

// Every measure with its unit, definition and source.
std::string measures_list();

// What the file is, then a line for each measure with its definition, cut to fit a screen (`width` > 0).
std::string record_text(const RecordNumbers& record, const MotionRequest& request, int width);

// A row for each record, a column for each measure. On a screen (`width` > 0) that is too narrow, the columns go on
// below in another block with the records' names.
std::string measures_table(const std::vector<RecordNumbers>& records, const MotionRequest& request, int width);

// Ordinates by period: the elastic spectrum, the inelastic one, RotD50 and RotD100. `every`: each how many periods.
std::string spectrum_table(const RecordNumbers& record, const std::string& name, std::size_t every);
std::string inelastic_table(const RecordNumbers& record, const std::string& name, const InelasticRequest& held,
                            std::size_t every);
std::string pair_table(const PairNumbers& pair, std::size_t every);

}  // namespace pilotis
