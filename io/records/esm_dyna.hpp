// DYNA of ESM and ITACA, one component a file: 64 lines "KEY: value" from EVENT_NAME to USER5, then one value a line.
// SAMPLING_INTERVAL_S, NDATA, UNITS and STREAM (the name of the component) are used.
//
// Traps: values contain colons and may be empty; velocity and displacement files share the header and are refused by
// DATA_TYPE. Checked by PGA_CM/S^2.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view esm_dyna_name = "ESM / ITACA DYNA";

bool recognises_esm_dyna(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_esm_dyna(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
