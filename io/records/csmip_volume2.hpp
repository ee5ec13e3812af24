// CSMIP (formerly CDMG) volume 2, .V2: corrected accelerograms. Per channel a header (csmip.hpp), then acceleration,
// velocity and displacement, each under a line such as
//     7500 points of accel data equally spaced at  .010 sec, in cm/sec2. (8f10.6)
//      2000 POINTS OF ACCEL DATA EQUALLY SPACED AT  .020 SEC.  (UNITS: CM/SEC/SEC)
// in columns of ten characters, eight a row unless the line says otherwise.
//
// Traps: counts differ by channel; fields of the header run together; control-Z fills the end of the file; the unit is
// sometimes missing (cm/s2, with a note); the peak in the header may have the opposite sign. Checked by that peak.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view csmip_volume2_name = "CSMIP volume 2 (.V2)";

bool recognises_csmip_volume2(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_csmip_volume2(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
