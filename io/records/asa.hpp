// ASA 2.0 (Archivo Estandar de Aceleracion, Mexico): a header of lines "LABEL : value" up to line 109, then one column
// of a fixed width for each channel, in gal. For the channels 1 to 6 and 7 to 12 the header has lists with a slash
// before each value, "/0.005/0.005/0.005".
//
// Traps: one or two rows more than stated (left out, with a note); up to twelve channels; CR LF. Checked by ACEL. MAX.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view asa_name = "ASA 2.0";

bool recognises_asa(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_asa(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
