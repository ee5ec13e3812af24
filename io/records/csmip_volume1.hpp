// CSMIP (formerly CDMG) volume 1, .V1: uncorrected accelerograms. Per channel a header (csmip.hpp), then
// newer files: samples in g, eight columns of nine characters with six decimals, with a line of the header such as
//     7400 points at 100 pts/sec, in g. (8f9.6)
// older files ("UNITS OF UNCOR ACCEL ARE SEC AND G/10"): pairs of time and acceleration, ten columns of seven
// characters with three decimals, as many pairs as NO. OF POINTS says.
//
// The body begins with the first row that is wholly in its columns, every field with its decimals.
// Traps: the times of the pairs jitter by their last digit or are uneven: see uneven.hpp. Checked by the header's MAX.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view csmip_volume1_name = "CSMIP volume 1 (.V1)";

bool recognises_csmip_volume1(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_csmip_volume1(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
