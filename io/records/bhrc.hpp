// BHRC volume 1 (Iran): per component twelve text lines from "* VOL1DS FILE" on, a blank one, 100 integers on seven
// lines, 50 reals on seven lines, then NO. OF POINTS values in G/10, ten columns of thirteen characters, and "/&". The
// number of samples a second is the first field of the second line of reals. "COMP L1" names the component; "Azimuth L
// 50 T 140" says where L and T point.
//
// Traps: three components (L, V, T). Checked by DURATION, which must be that of the points within one second.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view bhrc_name = "BHRC volume 1";

bool recognises_bhrc(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_bhrc(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
