// CWB (Taiwan): a header of lines "#Label: value" among them SampleRate(Hz), RecordLength(sec), AmplitudeUnit (gal),
// DataSequence ("Time U(+); N(+); E(+)") and Data ("4F10.3"), then rows of time and three components.
//
// The length is stated in seconds, rounded or cut off: the rows must agree with it within one unit of its last digit.
// The times must rise by the sample rate. Checked by AmplitudeMAX.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view cwb_name = "CWB";

bool recognises_cwb(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_cwb(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
