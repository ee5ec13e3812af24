// AFAD (Turkey): "STRONG GROUND MOTION RECORDS OF TURKIYE", lines "LABEL : value" among them NUMBER OF DATA and
// SAMPLING INTERVAL (sec), a line that names the columns (N-S E-W U-D), then one row of them for each sample, in gal.
//
// Traps: the text is not UTF-8; CR LF. The header states the peak of the raw record, which need not be that of these
// values: they are not compared.
#pragma once

#include <string>
#include <string_view>

#include "io/records/record.hpp"

namespace pilotis {

inline constexpr std::string_view afad_name = "AFAD";

bool recognises_afad(std::string_view content);

// Throws Error (input) naming file, line, what was found and what is allowed.
FileOfRecords read_afad(std::string_view content, const std::string& where, const RecordHints& hints);

}  // namespace pilotis
