// SMC, one component a file: eleven text lines, 48 integers (8I10), 50 reals (5E15.7), Int(16) comment lines, then
// Int(17) values in cm/s2, eight columns of ten characters with exponents of one digit and nothing between, or five of
// fourteen. Line 1 names the quantity: "1 UNCORRECTED ACCELEROGRAM", "2 CORRECTED ACCELEROGRAM"; of "0 UNKNOWN" the
// study must state the unit. Real(2) is the number of samples a second; Int(13) and Int(14) are the angle from the
// vertical and the azimuth; Real(30) and Real(32) are the largest and the smallest value.
//
// Traps: missing header values are -32768 and 0.17E+39; without Real(2) the numbers are (time, value) pairs, Int(17)
// counts both members, and times may be uneven or repeated (uneven.hpp); numbers may follow after the count (left out,
// with a note). Checked by Real(30) and Real(32).
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view smc_name = "SMC";

bool recognises_smc(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_smc(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
