// COSMOS strong-motion format v1.20 (files V0, V1, V2). Per channel: text lines (as many as line 1 says), 100 integers,
// 100 reals, comments, then blocks of numbers, each under a line such as
//     42000 acceleration pts, approx  210 secs, units=cm/sec2(04),Format=(1E15.6)
// and in the end "End-of-data" or "/&". The step is Real(62) in milliseconds; Real(64) is the peak.
//
// Traps: several channels; one, eight or ten values a line, which may run together; -999 is "unknown"; raw counts have
// no scale and are refused; velocity and displacement blocks are passed over. A file whose end mark is missing is taken
// as cut off. Checked by Real(64).
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view cosmos_name = "COSMOS v1.20";

bool recognises_cosmos(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_cosmos(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
