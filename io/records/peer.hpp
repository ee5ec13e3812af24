// The header of the PEER strong-motion database: four lines (what, which event, which quantity and unit, count and
// step), then values row by row, usually five columns of 15 characters that may run together.
//
// Traps: velocity and displacement files carry the same header and are refused by their third line; numbers without
// leading zero; CR LF; text after the step; the older fourth line "4164  0.0100  NPTS, DT".
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view peer_name = "PEER database header";

bool recognises_peer(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_peer(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
