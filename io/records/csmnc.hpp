// CSMNC (China), one component a file: sixteen header lines, among them "COMP. EW", "UNCORRECTED ACCELERATION  UNIT:
// CM/SEC/SEC" and "NO. OF POINTS:  8800  EQUALLY SPACED INTERVALS OF:  0.005  SEC", then values between blanks.
//
// Traps: velocity and displacement share the header and are refused. Checked by PEAK VALUE.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view csmnc_name = "CSMNC";

bool recognises_csmnc(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_csmnc(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
