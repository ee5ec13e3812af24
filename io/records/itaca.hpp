// ITACA .cor.acc, one component a file: labelled header lines from "Event Date & Time" to "PGA (m/s/s)", a line that
// names the quantity and its unit ("Accelaration time series in m/s/s"), then five columns of fourteen characters that
// run together.
//
// Traps: velocity and displacement files share the header and are refused by the line of the quantity. Checked by PGA.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view itaca_name = "ITACA .cor.acc";

bool recognises_itaca(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_itaca(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
