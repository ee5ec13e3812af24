// GeoNet volume 2 (.V2A): per component sixteen text lines, 40 integers (10I8), 60 reals (10F8), then Int(34) values of
// acceleration in mm/s2, Int(35) of velocity and Int(36) of displacement, each block of ten columns of eight characters
// that may run together. The step is Real(26); Real(25) is that of the recording.
//
// Traps: three components; "Uncorrected accelerogram" (volume 1) is another layout and refused. Checked by the peak of
// "Acceleration:  peak    -41.6 mm/s/s".
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view geonet_name = "GeoNet volume 2";

bool recognises_geonet(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_geonet(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
